#include "compare/key_formula.hpp"

namespace heraldgauge::compare {
namespace {

// (1 - V)/2 with the left analyser in the basis that the error rate belongs to.
Term half_deficit(const Case& point, model::QuantityKind kind, Terms& terms) {
  Case in_basis = point;
  in_basis.chain.left_end.analyser_deg = kind == model::QuantityKind::qber_diagonal ? 45 : 0;
  const Term deficit = terms.at(in_basis, {model::QuantityKind::visibility_deficit});
  if (!deficit.value) return deficit;
  return computed(*deficit.value * reference::Interval(model::Rational(1, 2), terms.bits()));
}

}  // namespace

Departure error_from_visibility() {
  Departure departure;
  departure.id = "error-from-visibility";
  departure.sentence = "Each error rate is (1 - V)/2, V measured in its basis.";
  departure.replaces = "error rate by (1 - V)/2";
  departure.claimed = "single pairs, alike detectors, no double clicks";
  departure.source = "common practice";
  departure.touches = touches_errors;
  return by_formula(std::move(departure), [](const Case& point, const model::Quantity& quantity, Terms& terms) {
    return with_error_rates(point, quantity, terms, half_deficit);
  });
}

}  // namespace heraldgauge::compare
