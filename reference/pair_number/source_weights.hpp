#pragma once
// Pair numbers of a source: probabilities, and the weight of one state.

#include <optional>
#include <vector>

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference::pair_number {

// The largest number of pairs that the source can give, where there is one: ideal pairs 1 (0 with p = 0), lam = 0: 0.
std::optional<long> most_pairs(const model::Source& source);

// Whether no source can give more pairs than its cut-off.
bool keep_all_pairs(const std::vector<model::Source>& sources, const std::vector<long>& cutoffs);

// pi(n), n = 0..last: the probability of n pairs, H and V together; squeezed (n+1) lam^n (1-lam)^2, ideal 1-p, p.
std::vector<Interval> pair_probabilities(const model::Source& source, long last, Precision bits);

// P(n > m): squeezed lam^(m+1) (1 + (m+1)(1-lam)).
Interval probability_beyond(const model::Source& source, long m, Precision bits);

// pi(n)/(n+1), n = 0..last: the product of amplitudes s(h, v) s(h', v') for any h + v = h' + v' = n.
std::vector<Interval> state_weights(const model::Source& source, long last, Precision bits);

}  // namespace heraldgauge::reference::pair_number
