#include "compare/key_formula.hpp"

#include "reference/arithmetic/binary_entropy.hpp"

namespace heraldgauge::compare {

using model::Quantity;
using model::QuantityKind;
using reference::Interval;

Term key_from(const KeyInputs& inputs, const model::Protocol& protocol, QuantityKind kind, const Interval& unit) {
  if (const auto missing = first_missing({&inputs.gain, &inputs.rectilinear, &inputs.diagonal, &inputs.herald})) {
    return *missing;
  }
  const reference::Precision bits = inputs.gain.value->precision();
  for (const Term* rate : {&inputs.rectilinear, &inputs.diagonal}) {
    if (certainly_less(*rate->value, Interval(0L, bits)) || certainly_less(Interval(1L, bits), *rate->value)) {
      return declined_term("an error rate lies outside [0, 1]");
    }
  }
  const Interval corrected =
      Interval(protocol.error_correction_factor, bits) * reference::binary_entropy(*inputs.rectilinear.value);
  const Interval share = Interval(1L, bits) - unit * (corrected + reference::binary_entropy(*inputs.diagonal.value));
  const Interval fraction =
      *inputs.gain.value * Interval(protocol.sifting, bits) * reference::larger_of(share, Interval(0L, bits));
  return computed(kind == QuantityKind::key_rate ? fraction * *inputs.herald.value : fraction);
}

KeyInputs key_inputs(const Case& point, Terms& terms) {
  const std::vector<Quantity> needed = {{QuantityKind::gain},
                                        {QuantityKind::qber_rectilinear},
                                        {QuantityKind::qber_diagonal},
                                        {QuantityKind::herald_probability}};
  terms.prepare(point, needed);
  return {terms.at(point, needed[0]), terms.at(point, needed[1]), terms.at(point, needed[2]),
          terms.at(point, needed[3])};
}

Term with_error_rates(const Case& point, const Quantity& quantity, Terms& terms, const ErrorRate& rate) {
  if (!touches_errors(quantity)) return terms.at(point, quantity);
  if (!touches_key(quantity)) return rate(point, quantity.kind, terms);
  KeyInputs inputs = key_inputs(point, terms);
  inputs.rectilinear = rate(point, QuantityKind::qber_rectilinear, terms);
  inputs.diagonal = rate(point, QuantityKind::qber_diagonal, terms);
  return key_from(inputs, point.chain.protocol, quantity.kind, Interval(1L, terms.bits()));
}

}  // namespace heraldgauge::compare
