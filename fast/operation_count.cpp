#include "fast/operation_count.hpp"

#include <algorithm>

namespace heraldgauge::fast {
namespace {

double triangle(int n) { return n * (n + 1) / 2.0; }

// One term at one station for all sectors of a vector.
double product(int in, int out, int deltas, bool symmetric) {
  double count = 0;
  for (int delta = 0; delta <= deltas; ++delta) {
    const int rows = in - delta + 1;
    const int columns = out - delta + 1;
    count += columns * triangle(rows) + rows * triangle(columns) * (symmetric ? 0.5 : 1);
  }
  return count;
}

double end(const EndView& view, int cutoff, int deltas) {
  const bool aligned = view.angle == 0 || view.angle == 90;
  if (aligned && !view.sectors) return triangle(cutoff + 1);
  double count = 0;
  for (int n = 0; n <= cutoff; ++n) {
    for (int delta = 0; delta <= std::min(view.sectors ? deltas : 0, n); ++delta) count += (n + 1.0) * (n - delta + 1);
  }
  return view.angle == 45 ? count / 2 : count;
}

double contraction(int cutoff, int deltas) {
  double count = 0;
  for (int delta = 0; delta <= deltas; ++delta) count += triangle(cutoff - delta + 1);
  return count;
}

double stations(const Plan& plan) {
  const double parities = plan.parity ? 2 : 1;
  double count = 0;
  for (std::size_t k = 0; k < plan.stations.size(); ++k) {
    const auto terms = static_cast<double>(plan.stations[k].terms.size());
    const int in = plan.cutoffs[k];
    const int out = plan.cutoffs[k + 1];
    for (const EndView& view : plan.left) {
      count += parities * terms * product(in, out, view.sectors ? plan.deltas() : 0, view.symmetric);
    }
    const auto shapes = static_cast<double>(std::min(k, plan.left.size()));
    count += shapes * terms * product(in, out, 0, plan.polarisations_alike);
  }
  return count;
}

}  // namespace

double multiply_adds(const Plan& plan) {
  double count = stations(plan);
  for (const EndView& view : plan.left) count += end(view, plan.cutoffs.front(), plan.deltas());
  for (const EndView& view : plan.right) count += end(view, plan.cutoffs.back(), plan.deltas());
  for (const Pairing& pairing : plan.pairings) {
    const bool sectors = plan.left[static_cast<std::size_t>(pairing.left)].sectors &&
                         plan.right[static_cast<std::size_t>(pairing.right)].sectors;
    count += contraction(plan.cutoffs.back(), sectors ? plan.deltas() : 0);
  }
  return count;
}

}  // namespace heraldgauge::fast
