#pragma once
// What people compute today, written plainly: the herald probability of an alike psi+ chain with independent dark
// counts, v = 1.

namespace heraldgauge::bench {

struct AlikeChain {
  int stations;
  double lam;
  double transmittance;
  double efficiency;
  double dark;
};

// Nested sum over the pairs h, v of every source, each source cut at n_k = h + v <= pairs: detectors conserve photon
// number, so the numbers are classical variables and only diagonal station elements enter. Terms:
// ((pairs+1)(pairs+2)/2)^(N+1).
double number_conserving_sum(const AlikeChain& chain, int pairs);

// Signed sum of no-click determinants over the subsets of clicking detectors, in binary64 with Eigen.
double determinant_subset_sum(const AlikeChain& chain);

}  // namespace heraldgauge::bench
