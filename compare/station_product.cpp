#include "compare/station_product.hpp"

namespace heraldgauge::compare {
namespace {

using reference::Interval;

// Station k = 0..N-1 with its two sources.
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

}  // namespace

Term product_over_stations(const Case& point, model::QuantityKind kind, Terms& terms, bool complement) {
  const Interval one(1L, terms.bits());
  Interval product = one;
  for (std::size_t k = 0; k < point.chain.station_count(); ++k) {
    const Term term = terms.at(one_station(point, k), {kind});
    if (!term.value) return term;
    product *= complement ? one - *term.value : *term.value;
  }
  return computed(product);
}

}  // namespace heraldgauge::compare
