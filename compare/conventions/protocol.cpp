// Protocol figures left out, and analyser angles doubled or halved by a wave plate.

#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Chain;

Departure by_edit(Departure departure, void (*edit)(Chain&)) {
  departure.kind = DepartureKind::convention;
  departure.source = "common practice";
  departure.transform = [edit](const Case& point) -> model::Expected<Case> {
    Case other = point;
    edit(other.chain);
    return other;
  };
  return by_other_chain(std::move(departure));
}

// What depends on the chain's own analyser angles.
bool touches_analyser(const model::Quantity& quantity) {
  using enum model::QuantityKind;
  return quantity.kind == end_pattern || quantity.kind == pattern_probability || quantity.kind == visibility ||
         quantity.kind == visibility_deficit;
}

}  // namespace

Departure sifting_left_out() {
  Departure departure;
  departure.id = "sifting-left-out";
  departure.sentence = "The share of events lost in sifting is not taken off.";
  departure.replaces = "sifting by 1";
  departure.claimed = "exact where one basis is chosen almost always";
  departure.touches = touches_key;
  return by_edit(std::move(departure), [](Chain& chain) { chain.protocol.sifting = 1; });
}

Departure ideal_error_correction() {
  Departure departure;
  departure.id = "ideal-error-correction";
  departure.sentence = "Error correction is taken to work at the Shannon limit.";
  departure.replaces = "f by 1";
  departure.claimed = "in the limit of long blocks, as a bound";
  departure.touches = touches_key;
  return by_edit(std::move(departure), [](Chain& chain) { chain.protocol.error_correction_factor = 1; });
}

Departure analyser_angle_doubled() {
  Departure departure;
  departure.id = "analyser-angle-doubled";
  departure.sentence = "Angles of half-wave plates are given where those of the analysers behind them are used.";
  departure.replaces = "th by 2 th at both ends";
  departure.claimed = "nowhere";
  departure.touches = touches_analyser;
  return by_edit(std::move(departure), [](Chain& chain) {
    chain.left_end.analyser_deg *= 2;
    chain.right_end.analyser_deg *= 2;
  });
}

Departure analyser_angle_halved() {
  Departure departure;
  departure.id = "analyser-angle-halved";
  departure.sentence = "Angles of analysers are given where those of half-wave plates before them are used.";
  departure.replaces = "th by th/2 at both ends";
  departure.claimed = "nowhere";
  departure.touches = touches_analyser;
  return by_edit(std::move(departure), [](Chain& chain) {
    chain.left_end.analyser_deg /= 2;
    chain.right_end.analyser_deg /= 2;
  });
}

}  // namespace heraldgauge::compare
