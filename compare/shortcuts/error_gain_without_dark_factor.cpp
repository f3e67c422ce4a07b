#include "compare/key_formula.hpp"

namespace heraldgauge::compare {
namespace {

using reference::Interval;

// The exact error rate is 1/2 - S (1-d_A)(1-d_B)/Q with S the interference term; the printed one lacks (1-d_A)(1-d_B).
Term without_dark_factor(const Case& point, model::QuantityKind kind, Terms& terms) {
  const model::Chain& chain = point.chain;
  for (const model::End* end : {&chain.left_end, &chain.right_end}) {
    const bool served = end->detectors[0] == end->detectors[1] && end->background.photons.is_zero() &&
                        end->detectors[0].dark_model == model::DarkModel::independent;
    if (!served) return declined_term("detectors alike within an end and independent dark counts are needed");
  }
  if (chain.station_count() != 0) return declined_term("the formula is for a link without stations");
  const Term exact = terms.at(point, {kind});
  if (!exact.value) return exact;
  const auto quiet = [&](const model::End& end) {
    return reference::enclose(model::Real(1) - end.detectors[0].dark_probability, terms.bits());
  };
  const Interval half(model::Rational(1, 2), terms.bits());
  return computed(half - (half - *exact.value) / (quiet(chain.left_end) * quiet(chain.right_end)));
}

}  // namespace

Departure error_gain_without_dark_factor() {
  Departure departure;
  departure.id = "error-gain-without-dark-factor";
  departure.sentence =
      "The printed error gain of a source between two ends lets dark counts leave the interference term alone.";
  departure.replaces = "E Q = Q/2 - S (1-d_A)(1-d_B) by E Q = Q/2 - S";
  departure.claimed = "d far below 1";
  departure.source = "Ma, Fung, Lo 2007 (formula from memory; the missing factor by own calculation)";
  departure.touches = touches_errors;
  return by_formula(std::move(departure), [](const Case& point, const model::Quantity& quantity, Terms& terms) {
    return with_error_rates(point, quantity, terms, without_dark_factor);
  });
}

}  // namespace heraldgauge::compare
