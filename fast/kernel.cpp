#include "fast/run_kernel.hpp"

#include <algorithm>

#include "fast/kernel.hpp"

namespace heraldgauge::fast {

int Plan::deltas() const { return *std::min_element(cutoffs.begin(), cutoffs.end()); }

template <class T>
KernelResult<T> run_kernel(const Plan& plan, const LinkModes<T>& modes) {
  return Kernel<T>(plan, modes).run();
}

namespace {

// The same operations with four doubles a register; no fused operation, so the same bytes. Everything is inlined here,
// so that no function compiled for these registers can be called from elsewhere.
__attribute__((target("avx2"), flatten)) KernelResult<Lanes<4>> run_wide(const Plan& plan,
                                                                         const LinkModes<Lanes<4>>& modes) {
  return Kernel<Lanes<4>>(plan, modes).run();
}

}  // namespace

template <>
KernelResult<Lanes<4>> run_kernel(const Plan& plan, const LinkModes<Lanes<4>>& modes) {
  static const bool wide = __builtin_cpu_supports("avx2");
  return wide ? run_wide(plan, modes) : Kernel<Lanes<4>>(plan, modes).run();
}

template KernelResult<double> run_kernel(const Plan&, const LinkModes<double>&);
template KernelResult<DoubleDouble> run_kernel(const Plan&, const LinkModes<DoubleDouble>&);

}  // namespace heraldgauge::fast
