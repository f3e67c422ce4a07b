#pragma once
// The chain as a product of transfer matrices. A state holds, for each sector D, X_D(a, b): everything to the left of
// and including a source's weights, with the H numbers of that source (a + D, a) and its V numbers (b, b + D), in
// either order.
//   X_0 = weight_0(n) A_D(a, b),  n = a + b + D <= cut of source 0,
//   X_k(c, d) = weight_k(n) sum over products, a, b of H_D(a, c) X_{k-1}(a, b) V_D(b, d),
//   P = sum over D of (2 - [D = 0]) sum_{a,b} X_N(a, b) B_D(a, b):
// Delta and -Delta contribute alike because every operator is real and symmetric.

#include <vector>

#include "reference/pair_number/heralded_chain.hpp"

namespace heraldgauge::reference::pair_number {

// The sectors that all cut-offs leave room for.
long sectors_within(const std::vector<long>& cutoffs);

// Multiplies X_D(a, b) by weights[a + b + D].
void apply_weights(Matrix& state, long sector, const std::vector<Interval>& weights);

// out(c, d) += sum_{a,b} H(a, c) in(a, b) V(b, d) for c + d <= rows(out) - 1, over a + b <= rows(in) - 1.
void accumulate(Matrix& out, const Product& product, const Matrix& in);

// Whether psi- is corrected, or strings of outcomes with an even and an odd number of psi- are kept apart.
enum class Strings { corrected, by_parity };

// Takes states from the first source (weights not yet applied) to the last (weights applied). By parity, the states
// come in pairs (even, odd). Runs of like stations are taken as powers where that costs less (station_run.hpp).
std::vector<SectorStack> contract_stations(const HeraldedChain& link, const std::vector<long>& cutoffs, Strings strings,
                                           std::vector<SectorStack> states, Precision bits);

// sum over D of (2 - [D = 0]) sum_{a,b} X_D(a, b) B_D(a, b).
Interval close_chain(const SectorStack& state, const SectorStack& end, Precision bits);

}  // namespace heraldgauge::reference::pair_number
