#include "reference/pair_number/heralded_chain.hpp"

#include <algorithm>

namespace heraldgauge::reference::pair_number {

StationPlace HeraldedChain::station(std::size_t k) const {
  return {chain.stations[k], chain.right_arms[k].transmittance, chain.left_arms[k + 1].transmittance, outcomes[k]};
}

HeraldedChain heralded(const model::Chain& chain) {
  HeraldedChain link{chain, {}};
  for (const model::Station& station : chain.stations)
    link.outcomes.push_back(model::accepted_outcomes(station.herald));
  return link;
}

HeraldedChain with_pattern(const model::Chain& chain, const model::Pattern& pattern) {
  HeraldedChain link{chain, {}};
  for (const auto& asks : pattern.stations) link.outcomes.push_back({model::AcceptedOutcome{asks, false}});
  return link;
}

HeraldedChain mirrored(const HeraldedChain& link) {
  HeraldedChain mirror{model::mirrored(link.chain), link.outcomes};
  std::reverse(mirror.outcomes.begin(), mirror.outcomes.end());
  return mirror;
}

}  // namespace heraldgauge::reference::pair_number
