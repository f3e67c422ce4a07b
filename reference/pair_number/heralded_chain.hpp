#pragma once
// A chain together with the click patterns that each station accepts: what the ends are not concerned with.

#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/pair_number/end_operator.hpp"
#include "reference/pair_number/station_operator.hpp"

namespace heraldgauge::reference::pair_number {

struct HeraldedChain {
  model::Chain chain;
  std::vector<std::vector<model::AcceptedOutcome>> outcomes;  // one list a station

  std::size_t station_count() const { return chain.stations.size(); }
  std::size_t source_count() const { return chain.sources.size(); }
  StationPlace station(std::size_t k) const;  // k = 0..N-1: between the sources k and k+1
  EndPlace left_end() const { return {chain.left_end, chain.left_arms.front().transmittance}; }
  EndPlace right_end() const { return {chain.right_end, chain.right_arms.back().transmittance}; }
};

// The stations accept what their heralds say.
HeraldedChain heralded(const model::Chain& chain);
// The stations accept one pattern, without any correction.
HeraldedChain with_pattern(const model::Chain& chain, const model::Pattern& pattern);
// The same seen from the right end.
HeraldedChain mirrored(const HeraldedChain& link);

}  // namespace heraldgauge::reference::pair_number
