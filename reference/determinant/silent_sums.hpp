#pragma once
// Sums over the stations' silent sets, for given silent sets at the ends.

#include <vector>

#include "reference/determinant/end_block.hpp"
#include "reference/determinant/ring.hpp"
#include "reference/optics/angles.hpp"

namespace heraldgauge::reference {

// For every pair of a left and a right end block, the joint probability of the station patterns and of silence at the
// detectors of both blocks: sums[left][right].
template <class Number>
std::vector<std::vector<Number>> silent_sums(const Ring<Number>& ring, const std::vector<EndBlock<Number>>& left,
                                             const std::vector<EndBlock<Number>>& right,
                                             const AngleFactors<Number>& angles);

}  // namespace heraldgauge::reference
