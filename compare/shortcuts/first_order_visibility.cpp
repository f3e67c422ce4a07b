#include "compare/visibility_of_mean_pairs.hpp"

namespace heraldgauge::compare {

Departure first_order_visibility() {
  Departure departure;
  departure.id = "first-order-visibility";
  departure.sentence = "The visibility to first order in the mean pairs, at vanishing efficiency.";
  departure.replaces = "V by 1 - 2 mu without a station, 1 - 8 mu with one";
  departure.claimed = "mu far below 1, eta -> 0, no dark counts";
  departure.source = "one source: Scarani et al. 2005 (abstract read); one station: own expansion";
  return by_mean_pairs(std::move(departure), [](const reference::Interval& mu, std::size_t stations) {
    return reference::Interval(1L, mu.precision()) - mu * (stations == 0 ? 2L : 8L);
  });
}

}  // namespace heraldgauge::compare
