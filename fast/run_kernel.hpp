#pragma once
// The kernel, instantiated for double, lanes of double, and double-double.

#include "fast/kernel.hpp"

namespace heraldgauge::fast {

template <class T>
KernelResult<T> run_kernel(const Plan& plan, const LinkModes<T>& modes);
template <>
KernelResult<Lanes<batch_width>> run_kernel(const Plan& plan, const LinkModes<Lanes<batch_width>>& modes);

// One lane of a result.
template <int Width>
KernelResult<double> lane_result(const KernelResult<Lanes<Width>>& all, int lane) {
  KernelResult<double> one;
  one.herald = all.herald.lane(lane);
  one.herald_tail = all.herald_tail.lane(lane);
  one.sums.reserve(all.sums.size());
  for (const auto& sum : all.sums)
    one.sums.push_back({sum.value.lane(lane), sum.magnitude.lane(lane), sum.tail.lane(lane)});
  one.final_tail = all.final_tail.lane(lane);
  one.final_vector.reset(all.final_vector.cutoff(), all.final_vector.deltas());
  for (std::size_t i = 0; i < all.final_vector.data().size(); ++i)
    one.final_vector.data()[i] = all.final_vector.data()[i].lane(lane);
  one.exponent[0] = all.exponent[static_cast<std::size_t>(lane)];
  one.count = all.count.lane(lane);
  return one;
}

}  // namespace heraldgauge::fast
