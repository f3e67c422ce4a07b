#include "compare/visibility_of_mean_pairs.hpp"

namespace heraldgauge::compare {

Departure low_efficiency_visibility() {
  Departure departure;
  departure.id = "low-efficiency-visibility";
  departure.sentence = "The visibility to all orders in the mean pairs, at vanishing efficiency.";
  departure.replaces = "V by (1+mu)/(1+3 mu) without a station, (1+mu)^2/(1+10 mu+17 mu^2) with one";
  departure.claimed = "eta -> 0, no dark counts, equal sources";
  departure.source = "one source: Takesue and Shimizu 2010 (from memory); one station: own calculation";
  return by_mean_pairs(std::move(departure), [](const reference::Interval& mu, std::size_t stations) {
    const reference::Interval one(1L, mu.precision()), up = one + mu;
    return stations == 0 ? up / (one + mu * 3L) : up * up / (one + mu * 10L + mu * mu * 17L);
  });
}

}  // namespace heraldgauge::compare
