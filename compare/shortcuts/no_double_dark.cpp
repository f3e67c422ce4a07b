#include "compare/fock/departure.hpp"

namespace heraldgauge::compare {

Departure no_double_dark() {
  Departure departure;
  departure.id = "no-double-dark";
  departure.sentence = "A herald never comes from two dark events: that term is dropped at every station.";
  departure.replaces = "P(two clicks) by P(two clicks) - P(two clicks without any photon in either)";
  departure.claimed = "d far below eta t lam";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto change = [](fock::Description& description) { description.with_double_dark = false; };
  return fock::by_changed_response(std::move(departure), change, fock::tail_of_model);
}

}  // namespace heraldgauge::compare
