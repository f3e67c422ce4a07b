#include "fast/run_kernel.hpp"

#include <algorithm>

#include "fast/kernel.hpp"

namespace heraldgauge::fast {

int Plan::deltas() const { return *std::min_element(cutoffs.begin(), cutoffs.end()); }

template <class T>
KernelResult<T> run_kernel(const Plan& plan, const LinkModes<T>& modes) {
  return Kernel<T>(plan, modes).run();
}

template KernelResult<double> run_kernel(const Plan&, const LinkModes<double>&);
template KernelResult<Lanes<4>> run_kernel(const Plan&, const LinkModes<Lanes<4>>&);
template KernelResult<DoubleDouble> run_kernel(const Plan&, const LinkModes<DoubleDouble>&);

}  // namespace heraldgauge::fast
