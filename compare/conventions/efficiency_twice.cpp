#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure efficiency_twice() {
  Departure departure;
  departure.id = "efficiency-twice";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The detector efficiency is applied twice: once in the channel figure and once in the detector.";
  departure.replaces = "eta by eta^2";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_detector(
        chain, [](model::Detector& detector) { detector.efficiency = detector.efficiency * detector.efficiency; });
  });
}

}  // namespace heraldgauge::compare
