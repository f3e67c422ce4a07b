#pragma once
// How many pairs each source keeps. The choice rests on estimates and needs no proof: whatever is chosen, the tail
// bound is computed afterwards and holds.

#include <vector>

#include "reference/pair_number/heralded_chain.hpp"

namespace heraldgauge::reference::pair_number {

struct Cutoffs {
  std::vector<long> pairs;  // per source
  double log2_herald;       // estimate of log2 of the probability of the accepted patterns; -infinity where it is 0
};

// Cut-offs with which the tail is estimated to stay below 2^log2_tail, each source's share being 1/(2(N+1)) of that. An
// ideal-pair source, or one that gives no pairs, keeps all it can give. The ends see `left` and `right`.
Cutoffs estimated_cutoffs(const HeraldedChain& link, const EndAsk& left, const EndAsk& right, double log2_tail);

// The same cut-offs raised where a computed tail of 2^log2_reached missed the aim: each by as many pairs as the missing
// factor is worth in powers of its pair parameter, at least one.
std::vector<long> raised_cutoffs(const HeraldedChain& link, std::vector<long> pairs, double log2_reached,
                                 double log2_tail);

}  // namespace heraldgauge::reference::pair_number
