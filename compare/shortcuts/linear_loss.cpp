#include "compare/fock/departure.hpp"

namespace heraldgauge::compare {

Departure linear_loss() {
  Departure departure;
  departure.id = "linear-loss";
  departure.sentence =
      "Every click probability of n photons at a detector is taken as n times the efficiency, at most 1.";
  departure.replaces = "1-(1-eta)^n by min(1, n eta)";
  departure.claimed = "eta far below 1";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto change = [](fock::Description& description) { description.rule = fock::ClickRule::linear; };
  return fock::by_changed_response(std::move(departure), change, fock::tail_of_model);
}

}  // namespace heraldgauge::compare
