#pragma once
// Three bounds on what is left out when source k keeps at most cutoffs[k] pairs (H and V together): the sum over all
// pair numbers with some n_k > cutoffs[k] of their probability times that of the herald and the end patterns. BOUNDS.md
// proves them. The upper end of each result is the bound.

#include <vector>

#include "reference/pair_number/heralded_chain.hpp"

namespace heraldgauge::reference::pair_number {

// Bound 1: sum_k P(n_k > m_k). Blind to how rare the herald is.
Interval tail_by_pair_numbers(const model::Chain& chain, const std::vector<long>& cutoffs, Precision bits);

// Bound 2: every place replaced by its w (place_bound.hpp).
Interval tail_by_places(const HeraldedChain& link, const std::vector<long>& cutoffs, const EndAsk& left,
                        const EndAsk& right, Precision bits);

// Bound 3, for every pair of end patterns, [left][right]: as bound 2, but a station between two sources that are both
// within their cut-offs keeps its exact operator.
std::vector<std::vector<Interval>> tail_by_operators(const HeraldedChain& link, const std::vector<long>& cutoffs,
                                                     const std::vector<EndAsk>& left, const std::vector<EndAsk>& right,
                                                     Precision bits);

// pi(0..M) of a source between two places that need at most `first_order` and `second_order` photon events. Where the
// source can give more pairs than the cut-off, M > cut-off and pi(M) is divided by 1 - rho, so that it stands for all n
// >= M in any sum of pi(n) times the w of both places:
//   rho = lam (M+2)/(M+1) * (M+1)/(M+1-first_order) * (M+1)/(M+1-second_order), M raised until rho < (1 + lam)/2.
// Else M is the cut-off.
std::vector<Interval> closed_pair_probabilities(const model::Source& source, long cutoff, long first_order,
                                                long second_order, Precision bits);

}  // namespace heraldgauge::reference::pair_number
