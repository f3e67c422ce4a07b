// Detector figures meant in one way and used in another.

#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Detector;
using model::Real;

Departure by_detectors(Departure departure, void (*edit)(Detector&)) {
  departure.kind = DepartureKind::convention;
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  departure.transform = [edit](const Case& point) -> model::Expected<Case> {
    Case other = point;
    for_each_detector(other.chain, edit);
    return other;
  };
  return by_other_chain(std::move(departure));
}

}  // namespace

Departure dark_per_pair() {
  Departure departure;
  departure.id = "dark-per-pair";
  departure.sentence = "The dark probability of each detector is taken as that of two detectors together.";
  departure.replaces = "d by 1 - sqrt(1-d)";
  return by_detectors(std::move(departure), [](Detector& detector) {
    detector.dark_probability = Real(1) - Real::square_root(Real(1) - detector.dark_probability);
  });
}

Departure efficiency_twice() {
  Departure departure;
  departure.id = "efficiency-twice";
  departure.sentence = "The detector efficiency is applied twice: once in the channel figure and once in the detector.";
  departure.replaces = "eta by eta^2";
  return by_detectors(std::move(departure),
                      [](Detector& detector) { detector.efficiency = detector.efficiency * detector.efficiency; });
}

}  // namespace heraldgauge::compare
