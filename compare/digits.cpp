#include "compare/digits.hpp"

#include <algorithm>

#include "reference/arithmetic/decimal.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

// floor(-log10 x) = floor(log10(1/x)) for x > 0.
long negative_logarithm(const Rational& x) { return reference::decimal_exponent(Rational(1 / x)); }

}  // namespace

int agreeing_digits(const Rational& value, const reference::Enclosure& exact) {
  if (value == exact.lower && value == exact.upper) return most_digits;
  if (exact.lower <= 0 && exact.upper >= 0) return 0;
  // (value - e)/e is monotonic in e on an interval without zero, so an end gives the largest error.
  const Rational at_lower = abs((value - exact.lower) / exact.lower);
  const Rational at_upper = abs((value - exact.upper) / exact.upper);
  const long digits = negative_logarithm(std::max(at_lower, at_upper));
  return static_cast<int>(std::clamp<long>(digits, 0, most_digits));
}

}  // namespace heraldgauge::compare
