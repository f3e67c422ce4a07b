#include "tests/support/oracle.hpp"

#include <fstream>
#include <nlohmann/json.hpp>
#include <stdexcept>

#include "tests/support/published.hpp"

namespace heraldgauge::test {
namespace {

using Json = nlohmann::json;
using model::Ask;
using model::Pattern;
using model::Rational;

model::Real real(const Json& text) { return exact_decimal(text.get<std::string>()); }

model::Detector detector(const Json& place) {
  model::Detector detector{real(place.at("eta")), real(place.at("d"))};
  const auto dark = place.at("dark").get<std::string>();
  if (dark != "independent" && dark != "thermal") throw std::runtime_error("unknown dark model " + dark);
  if (dark == "thermal") detector.dark_model = model::DarkModel::thermal;
  return detector;
}

model::Station station(const Json& place) {
  model::Station station;
  station.indistinguishability = real(place.at("v"));
  station.detectors.fill(detector(place));
  return station;
}

model::End end(const Json& place) {
  model::End end;
  end.detectors.fill(detector(place));
  end.analyser_deg = exact_decimal(place.at("theta_deg").get<std::string>());
  return end;
}

model::Chain chain(const Json& row) {
  model::Chain chain;
  for (const Json& lam : row.at("lam")) chain.sources.push_back({model::SourceKind::squeezed, real(lam)});
  chain.left_arms.push_back({real(row.at("A").at("t"))});
  for (const Json& place : row.at("stations")) {
    chain.right_arms.push_back({real(place.at("t_R"))});
    chain.left_arms.push_back({real(place.at("t_L"))});
    chain.stations.push_back(station(place));
  }
  chain.right_arms.push_back({real(row.at("B").at("t"))});
  chain.left_end = end(row.at("A"));
  chain.right_end = end(row.at("B"));
  return chain;
}

Ask ask(const std::string& text) {
  if (text == "1") return {Ask::Kind::clicks};
  if (text == "0") return {Ask::Kind::silent};
  if (text == "*") return {Ask::Kind::not_looked_at};
  if (text.size() > 1 && text[0] == 'n') return {Ask::Kind::counts, std::stoi(text.substr(1))};
  throw std::runtime_error("unknown pattern character " + text);
}

std::array<Ask, 2> end_asks(const Json& end) {
  if (end.is_null()) return {};
  return {ask(end.at("plus")), ask(end.at("cross"))};
}

Pattern pattern(const Json& asked) {
  Pattern pattern;
  for (const Json& at : asked.at("stations")) {
    pattern.stations.push_back({ask(at.at("cH")), ask(at.at("cV")), ask(at.at("dH")), ask(at.at("dV"))});
  }
  pattern.left = end_asks(asked.at("A"));
  pattern.right = end_asks(asked.at("B"));
  return pattern;
}

std::vector<Pattern> patterns(const Json& asked) {
  std::vector<Pattern> all;
  for (const Json& one : asked) all.push_back(pattern(one));
  return all;
}

// A detector that some pattern counts photons with is a resolving one.
template <std::size_t count>
bool mark_resolving(const std::array<Ask, count>& asks, std::array<model::Detector, count>& detectors) {
  bool any = false;
  for (std::size_t j = 0; j < count; ++j) {
    if (asks[j].kind != Ask::Kind::counts) continue;
    detectors[j].kind = model::DetectorKind::resolving;
    any = true;
  }
  return any;
}

bool mark_resolving(const Pattern& pattern, model::Chain& chain) {
  bool any = mark_resolving(pattern.left, chain.left_end.detectors);
  any = mark_resolving(pattern.right, chain.right_end.detectors) || any;
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    any = mark_resolving(pattern.stations[k], chain.stations[k].detectors) || any;
  }
  return any;
}

// The herald that accepts the station patterns of `asked`, where there is one.
void set_heralds(const Pattern& asked, model::Chain& chain) {
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    for (const model::AcceptedOutcome& outcome : model::accepted_outcomes(model::Herald::psi_minus)) {
      if (outcome.detectors == asked.stations[k]) chain.stations[k].herald = model::Herald::psi_minus;
    }
  }
}

OracleRow::Kind kind(const std::string& text) {
  if (text == "probability") return OracleRow::Kind::probability;
  if (text == "ratio") return OracleRow::Kind::ratio;
  if (text == "visibility") return OracleRow::Kind::visibility;
  throw std::runtime_error("unknown kind " + text);
}

OracleRow read(const Json& row) {
  OracleRow read;
  read.id = row.at("id");
  read.note = row.at("note");
  read.kind = kind(row.at("kind"));
  read.chain = chain(row);
  if (read.kind == OracleRow::Kind::visibility) {
    read.numerator = {pattern(row.at("vis").at("term"))};
    read.denominator = patterns(row.at("vis").at("den"));
  } else {
    read.numerator = patterns(row.at("num"));
    read.denominator = patterns(row.at("den"));
  }
  set_heralds(read.numerator.at(0), read.chain);
  for (const Pattern& one : read.numerator) read.resolving = mark_resolving(one, read.chain) || read.resolving;
  for (const Pattern& one : read.denominator) read.resolving = mark_resolving(one, read.chain) || read.resolving;
  const auto value = row.at("value").get<std::string>();
  read.value = exact_decimal(value);
  read.bound = exact_decimal(row.at("abs_error_bound").get<std::string>());
  read.half_last_digit = half_unit_of_last_digit(value);
  read.trusted_digits = row.at("significant_digits_trusted");
  return read;
}

}  // namespace

Rational OracleRow::lower() const {
  return value - half_last_digit - (kind == Kind::probability ? Rational(0) : bound);
}
Rational OracleRow::upper() const { return value + half_last_digit + bound; }

std::vector<OracleRow> oracle_rows() {
  std::ifstream file(HERALDGAUGE_SOURCE_DIR "/tests/published/oracle.json");
  std::vector<OracleRow> rows;
  const Json document = Json::parse(file);
  for (const Json& row : document.at("rows")) rows.push_back(read(row));
  return rows;
}

}  // namespace heraldgauge::test
