#include "compare/fock/departure.hpp"

namespace heraldgauge::compare {

Departure single_pair() {
  Departure departure;
  departure.id = "single-pair";
  departure.sentence = "A source that emits at all emits exactly one pair.";
  departure.replaces = "pi(n) by pi(0), 1 - pi(0), 0, ...";
  departure.claimed = "lam far below 1";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto cuts = [](const model::Chain& chain, const Setting&, double) {
    return std::vector<long>(chain.sources.size(), 1);
  };
  const auto change = [](fock::Description& description, const Setting&) {
    for (auto& weights : description.weights) weights[1] = (model::Real(1) - weights[0]) / model::Real(2);
  };
  return fock::by_fock(std::move(departure), {cuts, change, nullptr});
}

}  // namespace heraldgauge::compare
