#pragma once
// One probability as nested sums over pair numbers, in binary64: the herald together with plus alone clicking at both
// ends, analysers at 45 degrees. Tables of source weights, station elements and end elements are made once, then every
// term is visited.

#include "bench/chains.hpp"

namespace heraldgauge::bench {

inline constexpr double analyser_deg = 45;

// Over the pair numbers of both factors of the density operator, h, v and h', v' of every source from 0 to `pairs`,
// each term the product of its source weights, station elements and end elements:
//
//   P = sum prod_k s(h_k,v_k) s(h'_k,v'_k) <h'_0 v'_0|A|h_0 v_0> <h'_N v'_N|B|h_N v_N>
//           prod_k 2 <h'_{k-1} h'_k|E|h_{k-1} h_k> <v'_{k-1} v'_k|E|v_{k-1} v_k>
//
// Terms: (pairs + 1)^(4 (N + 1)).
double plain_nested_sum(const AlikeChain& chain, int pairs);

// The same with the knowledge that detectors conserve photon number: h' - h = v - v' is Delta at source 0, and changes
// its sign from source to source. Terms: sum over Delta of (pairs + 1 - |Delta|)^(2 (N + 1)), 1.0e7 for N = 3 and 6
// pairs.
double number_conserving_sum(const AlikeChain& chain, int pairs);

// The same terms, the product over all places to the left carried into the inner loops: what an optimising programmer
// makes of it.
double number_conserving_sum_carried(const AlikeChain& chain, int pairs);

}  // namespace heraldgauge::bench
