#pragma once
// The herald probability as the signed sum of no-click determinants over subsets of detectors, in binary64 with Eigen:
// no cut-off, but the terms cancel where noise and efficiencies are low.

#include "bench/chains.hpp"

namespace heraldgauge::bench {

double determinant_subset_sum(const AlikeChain& chain);

}  // namespace heraldgauge::bench
