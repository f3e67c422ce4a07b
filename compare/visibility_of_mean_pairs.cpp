#include "compare/visibility_of_mean_pairs.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using reference::Interval;

// Mean pairs per polarisation, averaged over the sources; nothing for ideal pairs.
std::optional<Interval> mean_pairs_of(const model::Chain& chain, reference::Precision bits) {
  Interval sum(bits);
  for (const model::Source& source : chain.sources) {
    if (source.kind != model::SourceKind::squeezed) return std::nullopt;
    sum += reference::enclose(source.pair_parameter / (model::Real(1) - source.pair_parameter), bits);
  }
  return sum / Interval(static_cast<long>(chain.sources.size()), bits);
}

}  // namespace

Departure by_mean_pairs(Departure departure, VisibilityOfMeanPairs visibility) {
  departure.touches = touches_visibility;
  return by_formula(std::move(departure), [visibility](const Case& point, const Quantity& quantity, Terms& terms) {
    if (!touches_visibility(quantity)) return terms.at(point, quantity);
    const auto mu = mean_pairs_of(point.chain, terms.bits());
    if (!mu || point.chain.station_count() > 1) {
      return declined_term("squeezed sources and at most one station are needed");
    }
    const Interval value = visibility(*mu, point.chain.station_count());
    const bool deficit = quantity.kind == model::QuantityKind::visibility_deficit;
    return computed(deficit ? Interval(1L, terms.bits()) - value : value);
  });
}

}  // namespace heraldgauge::compare
