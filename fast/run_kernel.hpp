#pragma once
// The kernel, instantiated for double, four lanes of double, and double-double.

#include "fast/kernel.hpp"

namespace heraldgauge::fast {

template <class T>
KernelResult<T> run_kernel(const Plan& plan, const LinkModes<T>& modes);
template <>
KernelResult<Lanes<4>> run_kernel(const Plan& plan, const LinkModes<Lanes<4>>& modes);

// One lane of a result.
inline KernelResult<double> lane_result(const KernelResult<Lanes<4>>& all, int lane) {
  KernelResult<double> one;
  one.herald = all.herald.lane(lane);
  one.herald_tail = all.herald_tail.lane(lane);
  for (const auto& sum : all.sums)
    one.sums.push_back({sum.value.lane(lane), sum.magnitude.lane(lane), sum.tail.lane(lane)});
  one.final_tails.reserve(all.final_tails.size());
  for (const auto& tail : all.final_tails) one.final_tails.push_back(tail.lane(lane));
  for (const Sectors<Lanes<4>>& sectors : all.finals) {
    Sectors<double> values(sectors.cutoff(), sectors.deltas());
    const std::vector<Lanes<4>>& from = sectors.data();
    for (std::size_t i = 0; i < from.size(); ++i) values.data()[i] = from[i].lane(lane);
    one.finals.push_back(std::move(values));
  }
  one.exponent[0] = all.exponent[static_cast<std::size_t>(lane)];
  one.count = all.count.lane(lane);
  return one;
}

}  // namespace heraldgauge::fast
