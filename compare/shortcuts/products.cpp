// Shortcuts that treat a chain as independent chains of one station each.

#include "compare/formula.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using reference::Interval;

// Station k = 0..N-1 with its two sources and their arms; the ends as they are.
Case one_station(const Case& point, std::size_t k) {
  const model::Chain& chain = point.chain;
  Case part = point;
  part.chain.sources = {chain.sources[k], chain.sources[k + 1]};
  part.chain.left_arms = {chain.left_arms[k], chain.left_arms[k + 1]};
  part.chain.right_arms = {chain.right_arms[k], chain.right_arms[k + 1]};
  part.chain.stations = {chain.stations[k]};
  part.pattern.reset();
  return part;
}

// The product over the stations of factor(value of the one-station chain); 1 without stations.
Term product_over_stations(const Case& point, QuantityKind kind, Terms& terms, bool complement) {
  const Interval one(1L, terms.bits());
  Interval product = one;
  for (std::size_t k = 0; k < point.chain.station_count(); ++k) {
    const Term term = terms.at(one_station(point, k), {kind});
    if (!term.value) return term;
    product *= complement ? one - *term.value : *term.value;
  }
  return computed(product);
}

Term herald_product_value(const Case& point, const Quantity& quantity, Terms& terms) {
  const Term herald = product_over_stations(point, QuantityKind::herald_probability, terms, false);
  if (!herald.value || quantity.kind == QuantityKind::herald_probability) return herald;
  if (quantity.kind == QuantityKind::key_rate) {
    const Term fraction = terms.at(point, {QuantityKind::key_fraction});
    return fraction.value ? computed(*fraction.value * *herald.value) : fraction;
  }
  if (quantity.kind != QuantityKind::trials_per_herald) return terms.at(point, quantity);
  if (herald.value->is_exactly_zero()) return {fast::Status::undefined, "no herald can occur", std::nullopt};
  return computed(Interval(1L, terms.bits()) / *herald.value);
}

// From the deficits, so that visibilities near 1 keep their digits. A link without a station has nothing to multiply.
Term visibility_product_value(const Case& point, const Quantity& quantity, Terms& terms) {
  if (quantity.kind != QuantityKind::visibility && quantity.kind != QuantityKind::visibility_deficit) {
    return terms.at(point, quantity);
  }
  if (point.chain.station_count() == 0) return declined_term("there is no station");
  const Term visibility = product_over_stations(point, QuantityKind::visibility_deficit, terms, true);
  if (!visibility.value || quantity.kind == QuantityKind::visibility) return visibility;
  return computed(Interval(1L, terms.bits()) - *visibility.value);
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
  departure.touches = [](const Quantity& quantity) {
    return quantity.kind == QuantityKind::visibility || quantity.kind == QuantityKind::visibility_deficit;
  };
  return by_formula(std::move(departure), visibility_product_value);
}

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
  return by_formula(std::move(departure), herald_product_value);
}

}  // namespace heraldgauge::compare
