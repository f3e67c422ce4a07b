#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure analyser_angle_doubled() {
  Departure departure;
  departure.id = "analyser-angle-doubled";
  departure.kind = DepartureKind::convention;
  departure.sentence = "Angles of half-wave plates are given where those of the analysers behind them are used.";
  departure.replaces = "th by 2 th at both ends";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_analyser;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    chain.left_end.analyser_deg *= 2;
    chain.right_end.analyser_deg *= 2;
  });
}

}  // namespace heraldgauge::compare
