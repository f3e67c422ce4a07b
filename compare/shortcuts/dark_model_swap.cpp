#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure dark_model_swap() {
  Departure departure;
  departure.id = "dark-model-swap";
  departure.sentence = "Independent dark counts are replaced by thermal noise in the detected mode, and the reverse.";
  departure.replaces = "(1-eta)^n by (1 - eta(1-d))^n";
  departure.claimed = "d far below the wanted relative accuracy";
  departure.source = "both are in use; the thermal form is attributed to Rohde and Ralph 2006 (from memory)";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_detector(chain, [](model::Detector& detector) {
      using enum model::DarkModel;
      detector.dark_model = detector.dark_model == independent ? thermal : independent;
    });
  });
}

}  // namespace heraldgauge::compare
