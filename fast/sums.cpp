#include "fast/sums.hpp"

namespace heraldgauge::fast {
namespace {

double as_double(double x) { return x; }
double as_double(const DoubleDouble& x) { return x.hi; }

// A sum none of whose kept terms differs from zero is zero: a pattern that is possible at all is possible with the few
// pairs that its clicks require, and at least that many are always kept.
template <class T>
Amount amount_of(const PairedSum<T>& sum, double round_off) {
  if (sum.magnitude == 0) return {};
  const double value = as_double(sum.value);
  return {value, round_off * sum.magnitude + half_ulp * std::fabs(value), sum.tail};
}

template <class T>
Visibility visibility_sum(const KernelResult<T>& result, const Planned& planned, const EndMode<T>& right, double unit) {
  const Layout& layout = planned.layout;
  const auto first = static_cast<std::size_t>(layout.samples);
  const auto count = static_cast<std::size_t>(layout.sample_count);
  VisibilityInput<T> input{&result.final_vector, &right,         result.final_tail, result.count, unit, {}, 0,
                           layout.even_in_angle, &*layout.circle};
  if (layout.even_in_angle) {
    const PairedSum<T>* full = &result.sums[static_cast<std::size_t>(layout.aligned_plus)];
    input.full = {full, full + 1};
    input.contrast_part = {&result.sums[first], &result.sums[first + count - 1]};
  }
  input.samples.reserve(count);
  double largest = 0;
  for (std::size_t s = 0; s < count; ++s) {
    const T relative_to_first = result.sums[first + s].value - result.sums[first].value;
    input.samples.push_back(as_double(relative_to_first));
    largest = larger(largest, std::fabs(input.samples.back()));
    input.sample_error = larger(input.sample_error, 2 * result.count * unit * result.sums[first + s].magnitude);
  }
  input.sample_error += 4 * half_ulp * largest;
  return visibility_of(input);
}

}  // namespace

template <class T>
Sums sums_of(const KernelResult<T>& result, const Planned& planned, const EndMode<T>& right, double unit) {
  const double round_off = second_order * result.count * unit;
  const Layout& layout = planned.layout;
  const auto take = [&](auto& to, int first) {
    if (first < 0) return;
    for (std::size_t i = 0; i < to.size(); ++i) {
      to[i] = amount_of(result.sums[static_cast<std::size_t>(first) + i], round_off);
    }
  };
  Sums sums;
  const double herald = as_double(result.herald);
  if (herald != 0) sums.herald = {herald, round_off * herald + half_ulp * herald, result.herald_tail};
  take(sums.rectilinear, layout.rectilinear);
  take(sums.analyser, layout.analyser);
  take(sums.diagonal, layout.diagonal);
  if (layout.samples >= 0) sums.visibility = visibility_sum(result, planned, right, unit);
  sums.exponent = result.exponent[0];
  return sums;
}

template Sums sums_of(const KernelResult<double>&, const Planned&, const EndMode<double>&, double);
template Sums sums_of(const KernelResult<DoubleDouble>&, const Planned&, const EndMode<DoubleDouble>&, double);

}  // namespace heraldgauge::fast
