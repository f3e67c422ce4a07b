#include "reference/arithmetic/binary_entropy.hpp"

namespace heraldgauge::reference {
namespace {

// h2 of one number. The larger of x and 1-x is folded away: 1 - x is exact for x in [1/2, 1], and both terms are
// positive.
Interval at_point(const Interval& x) {
  const Interval one(1L, x.precision());
  const Interval y = certainly_less(Interval(Rational(1, 2), x.precision()), x) ? one - x : x;
  if (y.is_exactly_zero()) return y;
  const Interval nats = y * logarithm(y) + (one - y) * logarithm_1p(-y);
  return restricted(-nats / log_of_2(x.precision()), 0, 1);
}

}  // namespace

Interval binary_entropy(const Interval& x) {
  const Interval probability = restricted(x, 0, 1);
  const Interval ends = hull(at_point(lower_end(probability)), at_point(upper_end(probability)));
  return probability.contains(Rational(1, 2)) ? hull(ends, Interval(1L, x.precision())) : ends;
}

}  // namespace heraldgauge::reference
