#pragma once
// Cut-offs together with the proven tail that goes with them.

#include <vector>

#include "reference/pair_number/heralded_chain.hpp"

namespace heraldgauge::reference::pair_number {

struct CertifiedTail {
  std::vector<long> cutoffs;                 // pairs kept per source
  std::vector<std::vector<Interval>> bound;  // for each left and right end pattern; the upper end counts
  Interval largest;                          // of all of them
};

// Chooses cut-offs so that the largest tail is at most 2^log2_tail (finite), and proves it by bound 3. The last resort
// after repeated raising is a tail that is larger than asked for; it is a bound all the same.
CertifiedTail certified_tail(const HeraldedChain& link, const std::vector<EndAsk>& left,
                             const std::vector<EndAsk>& right, double log2_tail);

}  // namespace heraldgauge::reference::pair_number
