#include "compare/station_product.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;

Term value(const Case& point, const Quantity& quantity, Terms& terms) {
  const Term herald = product_over_stations(point, QuantityKind::herald_probability, terms, false);
  if (!herald.value || quantity.kind == QuantityKind::herald_probability) return herald;
  if (quantity.kind == QuantityKind::key_rate) {
    const Term fraction = terms.at(point, {QuantityKind::key_fraction});
    return fraction.value ? computed(*fraction.value * *herald.value) : fraction;
  }
  if (quantity.kind != QuantityKind::trials_per_herald) return terms.at(point, quantity);
  if (herald.value->is_exactly_zero()) return {fast::Status::undefined, "no herald can occur", std::nullopt};
  return computed(reference::Interval(1L, terms.bits()) / *herald.value);
}

}  // namespace

Departure herald_product() {
  Departure departure;
  departure.id = "herald-product";
  departure.sentence =
      "The herald probability is the product of those of one-station chains, as if stations were independent.";
  departure.replaces = "P(herald) by prod_k P_k";
  departure.claimed = "nowhere; neighbouring stations share a source";
  departure.source = "common practice";
  departure.touches = [](const Quantity& quantity) {
    using enum QuantityKind;
    return quantity.kind == herald_probability || quantity.kind == trials_per_herald || quantity.kind == key_rate;
  };
  return by_formula(std::move(departure), value);
}

}  // namespace heraldgauge::compare
