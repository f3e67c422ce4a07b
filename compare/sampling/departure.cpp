#include "compare/sampling/departure.hpp"

#include <algorithm>
#include <cmath>
#include <sstream>

#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"
#include "compare/quantities_binary64.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using reference::Basis;
using reference::EndTable;

constexpr std::size_t most_stations = 4;

class CountedProbabilities : public Probabilities64 {
 public:
  explicit CountedProbabilities(const Counts& counts) : counts_(counts) {}
  double herald() override { return share(counts_.heralds); }
  std::optional<double> pattern(const model::Pattern&) override { return std::nullopt; }
  std::optional<Extremes> coincidence() override { return std::nullopt; }
  EndTable<double> ends(Basis basis) override {
    EndTable<double> table{};
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) table.joint[l][r] = share(counts_.ends.at(basis)[l][r]);
    }
    return table;
  }

 private:
  double share(std::uint64_t count) const { return static_cast<double>(count) / static_cast<double>(counts_.trials); }
  const Counts& counts_;
};

std::string effort_of(const Counts& counts) {
  std::ostringstream text;
  text.imbue(std::locale::classic());
  text << counts.trials << " trials, " << counts.heralds << " heralded";
  if (counts.heralds > 0) {
    text.precision(2);
    text << ", relative standard error " << 1 / std::sqrt(static_cast<double>(counts.heralds));
  }
  return text.str();
}

}  // namespace

bool is_sampled(const Quantity& quantity) {
  return touches_probabilities(quantity) && !touches_visibility(quantity) &&
         quantity.kind != QuantityKind::pattern_probability;
}

std::optional<std::string> not_sampled(const model::Chain& chain) {
  if (has_background(chain)) return "a shared background is not sampled";
  if (chain.station_count() > most_stations) return "more than four stations";
  return std::nullopt;
}

std::vector<Basis> bases_of(const std::vector<Quantity>& quantities) {
  std::vector<Basis> bases;
  const auto want = [&](Basis basis) {
    if (std::find(bases.begin(), bases.end(), basis) == bases.end()) bases.push_back(basis);
  };
  for (const Quantity& quantity : quantities) {
    if (quantity.kind == QuantityKind::end_pattern) want(Basis::analyser);
    if (quantity.kind == QuantityKind::gain || quantity.kind == QuantityKind::qber_rectilinear ||
        touches_key(quantity)) {
      want(Basis::rectilinear);
    }
    if (quantity.kind == QuantityKind::qber_diagonal || touches_key(quantity)) want(Basis::diagonal);
  }
  return bases;
}

std::vector<Value> by_sample(const Case& point, const std::vector<Quantity>& quantities, const Stop& stop) {
  if (const auto reason = not_sampled(point.chain)) return declined(quantities, *reason);
  TrialModel trials(point.chain);
  const Counts counts = sampled(trials, bases_of(quantities), stop, sampling_seed);
  CountedProbabilities probabilities(counts);
  std::vector<Value> values = quantities_of(probabilities, point, quantities);
  for (Value& value : values) value.effort = effort_of(counts);
  return values;
}

}  // namespace heraldgauge::compare
