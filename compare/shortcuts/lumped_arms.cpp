#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

void replace_by_geometric_mean(model::Arm& a, model::Arm& b) {
  if (a == b) return;
  a.transmittance = b.transmittance = model::Real::square_root(a.transmittance * b.transmittance);
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
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for (std::size_t k = 0; k < chain.station_count(); ++k) {
      replace_by_geometric_mean(chain.right_arms[k], chain.left_arms[k + 1]);
    }
    replace_by_geometric_mean(chain.left_arms.front(), chain.right_arms.back());
  });
}

}  // namespace heraldgauge::compare
