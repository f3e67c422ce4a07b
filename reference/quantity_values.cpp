#include "reference/quantity_values.hpp"

#include "reference/closed_form/capacity.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::QuantityKind;

template <class Number>
Computed<Number> ratio(const Number& numerator, const Number& denominator, const std::string& undefined) {
  if (is_exactly_zero(denominator)) return {std::nullopt, undefined, std::nullopt};
  if (is_exactly_zero(numerator)) return {numerator, "", std::nullopt};
  Number quotient = numerator;
  divide(quotient, numerator, denominator);
  return {quotient, "", std::nullopt};
}

template <class Tables>
auto error_rate(Tables& tables, Basis basis, bool agreement_expected) {
  const auto& table = tables.ends(basis);
  return ratio(erroneous(tables.field(), table, agreement_expected), both_ends_click(table), no_events);
}

Interval in_intervals(const Interval& x, Precision) { return x; }
Interval in_intervals(const Rational& x, Precision bits) { return {x, bits}; }

Interval as_share(const Interval& x) { return x.is_bounded() ? restricted(x, 0, 1) : x; }

}  // namespace

template <class Tables>
Computed<typename Tables::Number> rational_quantity(Tables& tables, const Chain& chain, const model::Quantity& quantity,
                                                    const std::optional<model::Pattern>& pattern) {
  using Number = typename Tables::Number;
  const Field<Number> field = tables.field();
  switch (quantity.kind) {
    case QuantityKind::herald_probability:
      return {tables.herald(), "", std::nullopt};
    case QuantityKind::pattern_probability:
      return {tables.pattern(*pattern), "", std::nullopt};
    case QuantityKind::trials_per_herald:
      return ratio(field(1L), tables.herald(), no_herald);
    case QuantityKind::end_pattern: {
      const auto left = static_cast<std::size_t>(quantity.outcome >> 2);
      const auto right = static_cast<std::size_t>(quantity.outcome & 3);
      return ratio(tables.ends(Basis::analyser).joint[left][right], tables.herald(), no_herald);
    }
    case QuantityKind::gain:
      return ratio(both_ends_click(tables.ends(Basis::rectilinear)), tables.herald(), no_herald);
    case QuantityKind::qber_rectilinear:
      if (is_exactly_zero(tables.herald())) break;
      return error_rate(tables, Basis::rectilinear, rectilinear_agreement_expected(chain));
    case QuantityKind::qber_diagonal:
      if (is_exactly_zero(tables.herald())) break;
      return error_rate(tables, Basis::diagonal, diagonal_agreement_expected);
    default:
      break;
  }
  return {std::nullopt, no_herald, std::nullopt};
}

template <class Tables>
Computed<Interval> key_quantity(Tables& tables, const Chain& chain, QuantityKind kind, Precision bits) {
  if (is_exactly_zero(tables.herald())) return {std::nullopt, no_herald, std::nullopt};
  const auto rectilinear = error_rate(tables, Basis::rectilinear, rectilinear_agreement_expected(chain));
  const auto diagonal = error_rate(tables, Basis::diagonal, diagonal_agreement_expected);
  for (const auto& rate : {rectilinear, diagonal}) {
    if (!rate.value) return {std::nullopt, rate.undefined, std::nullopt};
  }
  const Interval share = secret_share(chain.protocol, as_share(in_intervals(*rectilinear.value, bits)),
                                      as_share(in_intervals(*diagonal.value, bits)));
  Interval events = in_intervals(both_ends_click(tables.ends(Basis::rectilinear)), bits);
  if (kind == QuantityKind::key_fraction) events /= in_intervals(tables.herald(), bits);
  const Interval sifted = events * Interval(chain.protocol.sifting, bits);
  return {sifted * share, "", sifted};
}

Computed<Interval> visibility_quantity(IntervalTables& tables, QuantityKind kind) {
  const Precision bits = tables.accuracy().bits;
  if (is_exactly_zero(tables.herald())) return {std::nullopt, no_herald, std::nullopt};
  const IntervalTables::Coincidence& coincidence = tables.coincidence();
  if (coincidence.vanishes || is_exactly_zero(coincidence.sum)) {
    return {std::nullopt, "the coincidence is 0 at every angle of the right analyser", std::nullopt};
  }
  const bool deficit = kind == QuantityKind::visibility_deficit;
  if (coincidence.touches_zero) return {Interval(deficit ? 0L : 1L, bits), "", std::nullopt};
  return {as_share(deficit ? coincidence.smallest * 2L / coincidence.sum : coincidence.spread / coincidence.sum), "",
          std::nullopt};
}

Computed<Interval> capacity_quantity(const Chain& chain, QuantityKind kind, Precision bits) {
  const auto capacity = kind == QuantityKind::capacity_point   ? capacity_point(chain, bits)
                        : kind == QuantityKind::capacity_loose ? capacity_loose(chain, bits)
                        : kind == QuantityKind::capacity_chain ? capacity_chain(chain, bits)
                                                               : capacity_arm(chain, bits);
  if (capacity) return {*capacity, "", std::nullopt};
  return {std::nullopt, "the capacity is infinite: the transmittance is 1", std::nullopt};
}

template Computed<Interval> rational_quantity(IntervalTables&, const Chain&, const model::Quantity&,
                                              const std::optional<model::Pattern>&);
template Computed<Rational> rational_quantity(ExactTables&, const Chain&, const model::Quantity&,
                                              const std::optional<model::Pattern>&);
template Computed<Interval> key_quantity(IntervalTables&, const Chain&, QuantityKind, Precision);
template Computed<Interval> key_quantity(ExactTables&, const Chain&, QuantityKind, Precision);

}  // namespace heraldgauge::reference
