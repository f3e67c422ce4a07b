#pragma once
// The second engine for whole chains: the no-click determinant of all modes at once, in Arb ball arithmetic. Nothing is
// shared with the evaluator, neither the ring form nor the merging of equal terms nor the interval arithmetic.
//
// A set S of silent detectors gives K = sum_{j in S} T_j^dag eta_j T_j over the arms' modes, T_j the row from source
// modes to detector j. Number the arms so that the two arms of a source fall in two classes A and B and the two that
// meet at a station in the same; then
//
//   G(S) = g(S) prod_modes (1 - lam) / det(1 - sqrt(Lam) (1-K)_A sqrt(Lam) (1-K)_B^T).

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::test {

// The probability of a pattern as recorded, at the chain's own angles: the signed sum over all sets of silent
// detectors. Requires squeezed sources and a pattern that counts no photons. Cost 2^(clicks) determinants of order
// 2(N+1).
reference::Interval arb_pattern_probability(const model::Chain& chain, const model::Pattern& pattern,
                                            reference::Precision bits);

}  // namespace heraldgauge::test
