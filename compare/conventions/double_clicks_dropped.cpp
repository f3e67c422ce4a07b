#include "compare/key_formula.hpp"
#include "reference/quantities.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using reference::Interval;

// The same chain with both analysers at an angle.
Case at_angle(const Case& point, int degrees) {
  Case other = point;
  other.chain.left_end.analyser_deg = other.chain.right_end.analyser_deg = degrees;
  return other;
}

bool herald_may_be_minus(const model::Chain& chain) {
  for (const model::Station& station : chain.stations) {
    if (station.herald != model::Herald::psi_plus) return true;
  }
  return false;
}

// Events with exactly one click at each end, given the herald, and the share of them that is erroneous.
struct SingleClicks {
  Term events, error;
};
SingleClicks single_clicks(const Case& point, bool agreement_expected, Terms& terms) {
  const Quantity agreeing[] = {{QuantityKind::end_pattern, 0b1010}, {QuantityKind::end_pattern, 0b0101}};
  const Quantity differing[] = {{QuantityKind::end_pattern, 0b1001}, {QuantityKind::end_pattern, 0b0110}};
  terms.prepare(point, {agreeing[0], agreeing[1], differing[0], differing[1]});
  Interval agree(terms.bits()), differ(terms.bits());
  for (const Quantity& quantity : agreeing) {
    const Term term = terms.at(point, quantity);
    if (!term.value) return {term, term};
    agree += *term.value;
  }
  for (const Quantity& quantity : differing) {
    const Term term = terms.at(point, quantity);
    if (!term.value) return {term, term};
    differ += *term.value;
  }
  const Interval events = agree + differ;
  if (events.is_exactly_zero()) {
    const Term none{fast::Status::undefined, "no event has exactly one click at each end", std::nullopt};
    return {computed(events), none};
  }
  return {computed(events), computed((agreement_expected ? differ : agree) / events)};
}

bool touches_events(const Quantity& quantity) {
  return quantity.kind == QuantityKind::end_pattern || quantity.kind == QuantityKind::gain || touches_errors(quantity);
}

Term without_double_clicks(const Case& point, const Quantity& quantity, Terms& terms) {
  if (!touches_events(quantity)) return terms.at(point, quantity);
  if (quantity.kind == QuantityKind::end_pattern) {
    const bool twice = (quantity.outcome >> 2) == 3 || (quantity.outcome & 3) == 3;
    return twice ? computed(Interval(terms.bits())) : terms.at(point, quantity);
  }
  const auto& detectors = point.chain.right_end.detectors;
  const bool needs_diagonal = quantity.kind == QuantityKind::qber_diagonal || touches_key(quantity);
  if (needs_diagonal && herald_may_be_minus(point.chain) && !(detectors[0] == detectors[1])) {
    return declined_term("unlike right detectors with psi- outcomes: the exchange of bits is not that of detectors");
  }
  const SingleClicks rectilinear =
      single_clicks(at_angle(point, 0), reference::rectilinear_agreement_expected(point.chain), terms);
  if (quantity.kind == QuantityKind::gain) return rectilinear.events;
  if (quantity.kind == QuantityKind::qber_rectilinear) return rectilinear.error;
  const SingleClicks diagonal = single_clicks(at_angle(point, 45), reference::diagonal_agreement_expected, terms);
  if (quantity.kind == QuantityKind::qber_diagonal) return diagonal.error;
  const Term herald = terms.at(point, {QuantityKind::herald_probability});
  return key_from({rectilinear.events, rectilinear.error, diagonal.error, herald}, point.chain.protocol, quantity.kind,
                  Interval(1L, terms.bits()));
}

}  // namespace

Departure double_clicks_dropped() {
  Departure departure;
  departure.id = "double-clicks-dropped";
  departure.kind = DepartureKind::convention;
  departure.sentence = "Events with two clicks at an end are discarded.";
  departure.replaces = "outcomes drawn evenly by no outcome at all";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_events;
  return by_formula(std::move(departure), without_double_clicks);
}

}  // namespace heraldgauge::compare
