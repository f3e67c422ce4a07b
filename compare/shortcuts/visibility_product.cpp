#include "compare/station_product.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;

// From the deficits, so that visibilities near 1 keep their digits. A link without a station has nothing to multiply.
Term value(const Case& point, const Quantity& quantity, Terms& terms) {
  if (!touches_visibility(quantity)) return terms.at(point, quantity);
  if (point.chain.station_count() == 0) return declined_term("there is no station");
  const Term visibility = product_over_stations(point, QuantityKind::visibility_deficit, terms, true);
  if (!visibility.value || quantity.kind == QuantityKind::visibility) return visibility;
  return computed(reference::Interval(1L, terms.bits()) - *visibility.value);
}

}  // namespace

Departure visibility_product() {
  Departure departure;
  departure.id = "visibility-product";
  departure.sentence =
      "The visibility is the product over the stations of that of a chain made of the station and its two sources.";
  departure.replaces = "V by prod_k V_k";
  departure.claimed = "weak sources; each station worsens the state by a factor of its own";
  departure.source = "common practice";
  departure.touches = touches_visibility;
  return by_formula(std::move(departure), value);
}

}  // namespace heraldgauge::compare
