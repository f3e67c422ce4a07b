#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure analyser_angle_halved() {
  Departure departure;
  departure.id = "analyser-angle-halved";
  departure.kind = DepartureKind::convention;
  departure.sentence = "Angles of analysers are given where those of half-wave plates before them are used.";
  departure.replaces = "th by th/2 at both ends";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_analyser;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    chain.left_end.analyser_deg /= 2;
    chain.right_end.analyser_deg /= 2;
  });
}

}  // namespace heraldgauge::compare
