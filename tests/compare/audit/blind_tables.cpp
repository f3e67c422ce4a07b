#include "tests/compare/audit/blind_tables.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <memory>

#include "compare/audit/rule.hpp"
#include "compare/causes/evaluate.hpp"
#include "compare/other_chain.hpp"
#include "compare/registry.hpp"
#include "reference/arithmetic/decimal.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

using compare::Case;
using compare::Departure;
using compare::Setting;
using model::Quantity;
using model::Rational;

constexpr double telling_distance = 3;  // tolerances
constexpr int frames_a_pair = 20;       // some pairs never show: one undoes the other, or hides it

std::string number(double x, int digits) {
  return reference::decimal(Rational(x), digits, reference::Direction::nearest);
}

template <class T>
const T& pick(Random& random, const std::vector<T>& from) {
  return from[random() % from.size()];
}

// A scenario over which something can be swept, everything of realistic size.
std::string random_scenario(Random& random) {
  const int stations = static_cast<int>(random() % 4);
  const auto drawn = [&](double from, double to) { return number(log_uniform(random, from, to), 3); };
  std::string text =
      "title = \"blind\"\nchain.stations = " + std::to_string(stations) + "\nchain.herald = \"" +
      pick<std::string>(random, {"psi+", "psi-", "either"}) + "\"\nsource.pair_parameter = " + drawn(0.003, 0.2) +
      "\nchannel.length_km = " + drawn(10, 200) + "\nchannel.attenuation_db_per_km = 0.2\n" +
      "channel.insertion_loss_db = " + drawn(0.1, 2) + "\nend.detector.efficiency = " + drawn(0.1, 0.95) +
      "\nend.detector.dark_probability = " + drawn(1e-7, 1e-4) + "\nprotocol.sifting = " + drawn(0.3, 0.9) +
      "\nanalyser.left_deg = " + std::to_string(random() % 90) +
      "\nanalyser.right_deg = " + std::to_string(random() % 90) + "\n";
  if (stations > 0) {
    text += "station.detector.efficiency = " + drawn(0.1, 0.95) +
            "\nstation.detector.dark_probability = " + drawn(1e-7, 1e-4) +
            "\nstation.indistinguishability = " + drawn(0.7, 1) + "\n";
  }
  if (random() % 2 == 0) text += "[override]\n\"arm.0.left.transmittance\" = " + drawn(0.05, 0.9) + "\n";
  return text;
}

struct SweptKey {
  std::string key;
  double from, to;
};

// One or two keys to vary.
std::vector<SweptKey> random_keys(Random& random) {
  std::vector<SweptKey> keys = {{"source.pair_parameter", 0.003, 0.2},
                                {"channel.length_km", 10, 250},
                                {"end.detector.efficiency", 0.1, 0.95},
                                {"end.detector.dark_probability", 1e-7, 1e-4}};
  std::shuffle(keys.begin(), keys.end(), random);
  keys.resize(1 + random() % 2);
  return keys;
}

std::vector<Quantity> random_quantities(Random& random) {
  std::vector<std::string> names = {"herald_probability", "gain",
                                    "qber_rectilinear",   "qber_diagonal",
                                    "key_fraction",       "key_rate",
                                    "end_pattern_1010",   "end_pattern_1001",
                                    "visibility",         "visibility_deficit",
                                    "trials_per_herald",  "capacity_arm"};
  std::shuffle(names.begin(), names.end(), random);
  names.resize(1 + random() % 3);
  std::vector<Quantity> quantities;
  for (const std::string& name : names) quantities.push_back(*model::find_quantity(name));
  return quantities;
}

// The frame of a table: a scenario, points, quantities, digits.
struct Frame {
  std::string text;
  std::unique_ptr<model::Scenario> scenario;
  std::vector<SweptKey> keys;
  std::vector<std::vector<std::string>> cells;
  std::vector<Case> cases;
  std::vector<Quantity> quantities;
  int digits;
};

Frame random_frame(Random& random) {
  Frame frame;
  frame.text = random_scenario(random);
  frame.scenario = std::make_unique<model::Scenario>(model::read_scenario(frame.text, "blind").value());
  frame.keys = random_keys(random);
  frame.quantities = random_quantities(random);
  frame.digits = 4 + static_cast<int>(random() % 13);
  const std::size_t rows = 30 + random() % 71;
  for (std::size_t row = 0; row < rows; ++row) {
    std::vector<std::string> cells;
    std::vector<std::pair<std::string, model::Value>> changes;
    for (const SweptKey& swept : frame.keys) {
      cells.push_back(number(log_uniform(random, swept.from, swept.to), 4));
      changes.emplace_back(swept.key, *model::parse_exact(cells.back()));
    }
    frame.cells.push_back(cells);
    frame.cases.push_back(compare::case_with(*frame.scenario, changes).value());
  }
  return frame;
}

// A table of printed numbers; "0" where nothing was computed.
using Printed = std::vector<std::vector<std::string>>;

std::string csv_of(const Frame& frame, const Printed& numbers) {
  std::string text;
  for (const SweptKey& swept : frame.keys) text += swept.key + ",";
  for (std::size_t i = 0; i < frame.quantities.size(); ++i)
    text += (i > 0 ? "," : "") + model::name_of(frame.quantities[i]);
  text += "\n";
  for (std::size_t row = 0; row < numbers.size(); ++row) {
    for (const std::string& cell : frame.cells[row]) text += cell + ",";
    for (std::size_t i = 0; i < numbers[row].size(); ++i) text += (i > 0 ? "," : "") + numbers[row][i];
    text += "\n";
  }
  return text;
}

// Scientific notation with all digits written, as printf gives it, so that the last printed digit is the digits-th.
std::string printed(const Rational& x, int digits) {
  if (x == 0) return "0";
  std::string text = reference::decimal(x, digits, reference::Direction::nearest);
  const std::size_t e = text.find('e');
  const long exponent = reference::decimal_exponent(*model::parse_exact(text));
  std::string mantissa = text.substr(0, e);
  std::string kept;
  bool leading = true;
  for (const char c : mantissa) {
    if (c == '-' || c == '.') continue;
    leading = leading && c == '0';
    if (!leading) kept += c;
  }
  kept.resize(static_cast<std::size_t>(digits), '0');
  return (text[0] == '-' ? "-" : "") + kept.substr(0, 1) + "." + kept.substr(1) + "e" + std::to_string(exponent);
}

Rational rational_of(const fast::Scaled& value) {
  Rational x(value.significand);
  if (value.exponent > 0) mpq_mul_2exp(x.get_mpq_t(), x.get_mpq_t(), static_cast<mp_bitcnt_t>(value.exponent));
  if (value.exponent < 0) mpq_div_2exp(x.get_mpq_t(), x.get_mpq_t(), static_cast<mp_bitcnt_t>(-value.exponent));
  return x;
}

using Evaluate = std::function<std::vector<compare::Value>(const Case&, const std::vector<Quantity>&)>;

// Nothing where some number is not computed.
std::optional<Printed> printed_table(const Frame& frame, const Evaluate& evaluate) {
  Printed numbers;
  for (const Case& point : frame.cases) {
    std::vector<std::string>& row = numbers.emplace_back();
    for (const compare::Value& value : evaluate(point, frame.quantities)) {
      if (value.status != fast::Status::computed) return std::nullopt;
      row.push_back(printed(rational_of(value.value), frame.digits));
    }
  }
  return numbers;
}

// Whether some number of `a` lies more than three tolerances from that of `b`.
bool tells_apart(const Frame& frame, const Printed& a, const Printed& b) {
  for (std::size_t row = 0; row < a.size(); ++row) {
    for (std::size_t i = 0; i < a[row].size(); ++i) {
      const auto given = *compare::read_printed(a[row][i]);
      const auto range = compare::accepted(given, std::nullopt, frame.quantities[i], {});
      const Rational other = *model::parse_exact(b[row][i]);
      const Rational reach = (range.upper - range.lower) / 2;
      if (abs(other - given.value) > static_cast<int>(telling_distance) * reach) return true;
    }
  }
  return false;
}

struct Planted {
  const Departure* departure;
  Setting setting;
};

// Every departure is as likely as any other; frames are then drawn until it applies.
Planted random_departure(Random& random, const std::function<bool(const Departure&)>& suits) {
  std::vector<const Departure*> all;
  for (const auto* registry : {&compare::shortcuts(), &compare::conventions()}) {
    for (const Departure& one : *registry) {
      if (suits(one)) all.push_back(&one);
    }
  }
  const Departure* departure = pick(random, all);
  if (!departure->setting) return {departure, std::nullopt};
  return {departure, pick(random, departure->setting->candidates)};
}

bool touches_some(const Planted& planted, const Frame& frame) {
  return std::any_of(frame.quantities.begin(), frame.quantities.end(), planted.departure->touches);
}

Evaluate evaluate_of(const Planted& planted) {
  return [planted](const Case& point, const std::vector<Quantity>& quantities) {
    return compare::values_of_departure(*planted.departure, planted.setting, point, quantities);
  };
}

Evaluate evaluate_of(const Planted& outer, const Planted& inner) {
  return [outer, inner](const Case& point, const std::vector<Quantity>& quantities) {
    const auto changed = outer.departure->transform(point);
    if (!changed) return std::vector<compare::Value>(quantities.size());
    return compare::values_of_departure(*inner.departure, inner.setting, *changed, quantities);
  };
}

std::string note_of(const Planted& planted) {
  return planted.departure->id + (planted.setting ? " " + planted.setting->get_str() : "");
}

std::optional<BlindTable> one_planted(const Planted& planted, const Frame& frame) {
  if (!touches_some(planted, frame)) return std::nullopt;
  const auto numbers = printed_table(frame, evaluate_of(planted));
  if (!numbers) return std::nullopt;
  const auto exact = printed_table(frame, compare::values_of_model);
  if (!exact || !tells_apart(frame, *numbers, *exact)) return std::nullopt;
  return BlindTable{frame.text, csv_of(frame, *numbers), {planted.departure->id}, note_of(planted)};
}

std::optional<BlindTable> two_planted(const Planted& outer, const Planted& inner, const Frame& frame) {
  if (!touches_some(outer, frame) || !touches_some(inner, frame)) return std::nullopt;
  const auto numbers = printed_table(frame, evaluate_of(outer, inner));
  if (!numbers) return std::nullopt;
  const auto exact = printed_table(frame, compare::values_of_model);
  const auto first = printed_table(frame, evaluate_of(outer));
  const auto second = printed_table(frame, evaluate_of(inner));
  if (!exact || !first || !second) return std::nullopt;
  for (const Printed* other : {&*exact, &*first, &*second}) {
    if (!tells_apart(frame, *numbers, *other)) return std::nullopt;
  }
  if (!tells_apart(frame, *first, *exact) || !tells_apart(frame, *second, *exact)) return std::nullopt;
  return BlindTable{frame.text,
                    csv_of(frame, *numbers),
                    {outer.departure->id, inner.departure->id},
                    note_of(outer) + " + " + note_of(inner)};
}

// One row from the reference evaluator; shorter than the quantities where one is undefined.
std::vector<std::string> certified_row(const Case& point, const Frame& frame) {
  std::vector<std::string> row;
  for (const auto& value : compare::certified_values_of(point, frame.quantities, frame.digits + 3)) {
    if (value.enclosure) row.push_back(printed((value.enclosure->lower + value.enclosure->upper) / 2, frame.digits));
  }
  return row;
}

}  // namespace

BlindTable clean_table(Random& random, Evaluator evaluator) {
  for (;;) {
    const Frame frame = random_frame(random);
    std::optional<Printed> numbers;
    if (evaluator == Evaluator::fast) {
      numbers = printed_table(frame, compare::values_of_model);
    } else {
      numbers.emplace();
      for (const Case& point : frame.cases) numbers->push_back(certified_row(point, frame));
    }
    const auto complete = [&](const std::vector<std::string>& row) { return row.size() == frame.quantities.size(); };
    if (numbers && std::all_of(numbers->begin(), numbers->end(), complete))
      return {frame.text, csv_of(frame, *numbers), {}, "clean"};
  }
}

BlindTable table_with_one(Random& random) {
  const Planted planted = random_departure(random, [](const Departure&) { return true; });
  for (;;) {
    if (const auto table = one_planted(planted, random_frame(random))) return *table;
  }
}

BlindTable table_with_two(Random& random) {
  for (;;) {
    const Planted outer =
        random_departure(random, [](const Departure& one) { return static_cast<bool>(one.transform); });
    const Planted inner = random_departure(random, [&](const Departure& one) { return &one != outer.departure; });
    for (int attempt = 0; attempt < frames_a_pair; ++attempt) {
      if (const auto table = two_planted(outer, inner, random_frame(random))) return *table;
    }
  }
}

}  // namespace heraldgauge::test
