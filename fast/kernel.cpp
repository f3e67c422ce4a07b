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

using Batch = Lanes<batch_width>;

// The same operations in wider registers; no fused operation, so the same bytes. Everything is inlined here, so that no
// function compiled for these registers can be called from elsewhere.
__attribute__((target("avx2"), flatten)) KernelResult<Batch> run_in_256_bits(const Plan& plan,
                                                                             const LinkModes<Batch>& modes) {
  return Kernel<Batch>(plan, modes).run();
}
__attribute__((target("avx512f,avx512dq,avx512vl"), flatten)) KernelResult<Batch> run_in_512_bits(
    const Plan& plan, const LinkModes<Batch>& modes) {
  return Kernel<Batch>(plan, modes).run();
}

using Run = KernelResult<Batch> (*)(const Plan&, const LinkModes<Batch>&);
Run widest() {
  const bool has_512 =
      __builtin_cpu_supports("avx512f") && __builtin_cpu_supports("avx512dq") && __builtin_cpu_supports("avx512vl");
  if (has_512) return run_in_512_bits;
  if (__builtin_cpu_supports("avx2")) return run_in_256_bits;
  return [](const Plan& plan, const LinkModes<Batch>& modes) { return Kernel<Batch>(plan, modes).run(); };
}

}  // namespace

template <>
KernelResult<Batch> run_kernel(const Plan& plan, const LinkModes<Batch>& modes) {
  static const Run run = widest();
  return run(plan, modes);
}

template KernelResult<double> run_kernel(const Plan&, const LinkModes<double>&);
template KernelResult<DoubleDouble> run_kernel(const Plan&, const LinkModes<DoubleDouble>&);

}  // namespace heraldgauge::fast
