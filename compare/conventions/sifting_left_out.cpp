#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure sifting_left_out() {
  Departure departure;
  departure.id = "sifting-left-out";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The share of events lost in sifting is not taken off.";
  departure.replaces = "sifting by 1";
  departure.claimed = "exact where one basis is chosen almost always";
  departure.source = "common practice";
  departure.touches = touches_key;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) { chain.protocol.sifting = 1; });
}

}  // namespace heraldgauge::compare
