#pragma once
// The probabilities that quantities are made of, from one run of the kernel.

#include <array>

#include "fast/amount.hpp"
#include "fast/planner.hpp"
#include "fast/run_kernel.hpp"
#include "fast/visibility.hpp"

namespace heraldgauge::fast {

// Per trial, times 2^exponent each. Tables by left outcome * 4 + right outcome, bits by left bit * 2 + right bit.
struct Sums {
  Amount herald;
  std::array<Amount, 16> rectilinear;
  std::array<Amount, 16> analyser;
  std::array<Amount, 4> diagonal;
  Visibility visibility;
  long exponent = 0;
};

template <class T>
Sums sums_of(const KernelResult<T>& result, const Planned& planned, const EndMode<T>& right, double unit);

}  // namespace heraldgauge::fast
