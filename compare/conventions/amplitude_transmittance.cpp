#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure amplitude_transmittance() {
  Departure departure;
  departure.id = "amplitude-transmittance";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The power transmittance of each arm is replaced by its square root.";
  departure.replaces = "t by sqrt(t)";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_everything;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_arm(chain, [](model::Arm& arm) { arm.transmittance = model::Real::square_root(arm.transmittance); });
  });
}

}  // namespace heraldgauge::compare
