#include "compare/formula.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using reference::Interval;

Interval product_of_arms(const model::Chain& chain, reference::Precision bits) {
  Interval product(1L, bits);
  for (const auto* arms : {&chain.left_arms, &chain.right_arms}) {
    for (const model::Arm& arm : *arms) product *= reference::enclose(arm.transmittance, bits);
  }
  return product;
}

// 1.44 eta (2.88 eta for the looser bound), eta as the capacity of that name means it.
Term value(const Case& point, const Quantity& quantity, Terms& terms) {
  const model::Chain& chain = point.chain;
  const reference::Precision bits = terms.bits();
  const Interval slope(model::Rational(quantity.kind == QuantityKind::capacity_loose ? 288 : 144) / 100, bits);
  if (quantity.kind == QuantityKind::capacity_point || quantity.kind == QuantityKind::capacity_loose) {
    return computed(slope * product_of_arms(chain, bits));
  }
  if (!touches_capacities(quantity)) return terms.at(point, quantity);
  std::optional<Interval> worst;
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    const Interval left = reference::enclose(chain.left_arms[k].transmittance, bits);
    const Interval right = reference::enclose(chain.right_arms[k].transmittance, bits);
    const Interval here = quantity.kind == QuantityKind::capacity_chain ? left * right : smaller_of(left, right);
    worst = worst ? smaller_of(*worst, here) : here;
  }
  return computed(slope * *worst);
}

}  // namespace

Departure linear_capacity() {
  Departure departure;
  departure.id = "linear-capacity";
  departure.sentence = "Capacities are taken proportional to the transmittance.";
  departure.replaces = "-log2(1-eta) by 1.44 eta, log2((1+eta)/(1-eta)) by 2.88 eta";
  departure.claimed = "eta far below 1";
  departure.source = "common practice";
  departure.touches = touches_capacities;
  return by_formula(std::move(departure), value);
}

}  // namespace heraldgauge::compare
