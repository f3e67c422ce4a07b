#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure ideal_error_correction() {
  Departure departure;
  departure.id = "ideal-error-correction";
  departure.kind = DepartureKind::convention;
  departure.sentence = "Error correction is taken to work at the Shannon limit.";
  departure.replaces = "f by 1";
  departure.claimed = "in the limit of long blocks, as a bound";
  departure.source = "common practice";
  departure.touches = touches_key;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) { chain.protocol.error_correction_factor = 1; });
}

}  // namespace heraldgauge::compare
