// Shortcuts that replace the chain by a simpler one.

#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Chain;
using model::Real;

void replace_by_geometric_mean(model::Arm& a, model::Arm& b) {
  if (a == b) return;
  a.transmittance = b.transmittance = Real::square_root(a.transmittance * b.transmittance);
}

}  // namespace

Departure lumped_arms() {
  Departure departure;
  departure.id = "lumped-arms";
  departure.sentence = "The two arms of every station, and both end arms, get their geometric mean.";
  departure.replaces = "t_R, t_L by sqrt(t_R t_L)";
  departure.claimed = "arms of nearly equal length";
  departure.source = "common practice";
  departure.touches = touches_everything;
  departure.transform = [](const Case& point) -> model::Expected<Case> {
    Case other = point;
    Chain& chain = other.chain;
    for (std::size_t k = 0; k < chain.station_count(); ++k) {
      replace_by_geometric_mean(chain.right_arms[k], chain.left_arms[k + 1]);
    }
    replace_by_geometric_mean(chain.left_arms.front(), chain.right_arms.back());
    return other;
  };
  return by_other_chain(std::move(departure));
}

Departure dark_model_swap() {
  Departure departure;
  departure.id = "dark-model-swap";
  departure.sentence = "Independent dark counts are replaced by thermal noise in the detected mode, and the reverse.";
  departure.replaces = "(1-eta)^n by (1 - eta(1-d))^n";
  departure.claimed = "d far below the wanted relative accuracy";
  departure.source = "both are in use; the thermal form is attributed to Rohde and Ralph 2006 (from memory)";
  departure.touches = touches_probabilities;
  departure.transform = [](const Case& point) -> model::Expected<Case> {
    Case other = point;
    for_each_detector(other.chain, [](model::Detector& detector) {
      using enum model::DarkModel;
      detector.dark_model = detector.dark_model == independent ? thermal : independent;
    });
    return other;
  };
  return by_other_chain(std::move(departure));
}

}  // namespace heraldgauge::compare
