#include "reference/width.hpp"

#include <algorithm>
#include <cmath>

namespace heraldgauge::reference {
namespace {

Rational ten_to_the(int exponent) {
  model::Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(exponent));
  return power;
}

// A lower bound on max(|x|, scale) over the interval.
Rational reference_size(const Interval& x, const std::optional<Interval>& scale) {
  Rational size = 0;
  if (!x.contains_zero()) size = std::min(Rational(abs(x.lower())), Rational(abs(x.upper())));
  if (scale && scale->is_bounded()) size = std::max(size, scale->lower());
  return size;
}

bool has_width_below(const Interval& x, const std::optional<Interval>& scale, int digits) {
  const Rational width = x.upper() - x.lower();
  return width * ten_to_the(digits) <= reference_size(x, scale);
}

}  // namespace

bool is_narrow_enough(const Interval& x, const std::optional<Interval>& scale, int digits) {
  return x.is_bounded() && has_width_below(x, scale, digits + 1);
}

std::optional<double> missing_bits(const Interval& x, const std::optional<Interval>& scale, int digits) {
  if (!x.is_bounded()) return std::nullopt;
  double log2_size = x.log2_mignitude();
  if (scale && scale->is_bounded()) log2_size = std::max(log2_size, scale->log2_mignitude());
  if (!std::isfinite(log2_size)) return std::nullopt;
  return x.log2_width() - log2_size + bits_per_digit * (digits + 1);
}

int certified_digits(const Interval& x, const std::optional<Interval>& scale, int asked) {
  if (!x.is_bounded()) return 0;
  if (x.lower() == x.upper()) return digits_of_exact;
  int digits = 0;
  for (int step = asked; step > 0; step /= 2) {  // bisection on the number of digits
    while (digits + step <= asked && has_width_below(x, scale, digits + step)) digits += step;
  }
  return digits;
}

}  // namespace heraldgauge::reference
