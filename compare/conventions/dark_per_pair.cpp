#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

using model::Real;

Departure dark_per_pair() {
  Departure departure;
  departure.id = "dark-per-pair";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The dark probability of each detector is taken as that of two detectors together.";
  departure.replaces = "d by 1 - sqrt(1-d)";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_detector(chain, [](model::Detector& detector) {
      detector.dark_probability = Real(1) - Real::square_root(Real(1) - detector.dark_probability);
    });
  });
}

}  // namespace heraldgauge::compare
