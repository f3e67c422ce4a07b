#pragma once
// What a direct program computes: the exact formula for threshold detectors, a signed sum over the detectors that stay
// silent, carried out in a machine arithmetic. Correct on paper; the terms cancel, and for rare heralds no digit is
// left.

#include <array>

#include "reference/model/chain.hpp"
#include "reference/model/fault.hpp"

namespace heraldgauge::compare {

struct SubsetSum {
  double herald = 0;  // per trial
  std::array<std::array<double, 4>, 4>
      joint{};  // herald and exactly these end clicks: [left][right], index 2*plus + cross
};

// In binary64 or binary32 (Number is double or float): P(C click, Z silent) = sum over S in C of (-1)^|S| G(S u Z),
// subsets in binary order, G in its ring form (a product of 2x2 matrices round the chain). Faults where a detector
// counts photons, a source is not squeezed, or there are more than `largest_subset_sum_stations` stations (the work
// grows as 8^N, 16^N for "either").
template <class Number>
model::Expected<SubsetSum> subset_sum(const model::Chain& chain);

inline constexpr std::size_t largest_subset_sum_stations = 5;

}  // namespace heraldgauge::compare
