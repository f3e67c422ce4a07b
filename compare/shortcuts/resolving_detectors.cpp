#include "compare/fock/departure.hpp"

namespace heraldgauge::compare {

Departure resolving_detectors() {
  Departure departure;
  departure.id = "resolving-detectors";
  departure.sentence = "Every click means exactly one photon registered, with the same efficiency and dark counts.";
  departure.replaces = "P(click | n) by P(one count | n)";
  departure.claimed = "lam eta far below 1";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto change = [](fock::Description& description) { description.rule = fock::ClickRule::one_photon; };
  return fock::by_changed_response(std::move(departure), change, fock::tail_of_model);
}

}  // namespace heraldgauge::compare
