#pragma once
// A non-negative number with a bound on its own error, and the few operations that form quantities.

#include <cmath>

namespace heraldgauge::fast {

inline constexpr double half_ulp = 0x1p-53;

// The exact value lies within error + tail of `value`: round-off, and what was cut off.
struct Amount {
  double value = 0;
  double error = 0;
  double tail = 0;

  // Bound on |value - exact| / |exact|; infinite where the value is not resolved.
  double relative() const {
    const double all = error + tail;
    if (all == 0) return 0;
    const double size = std::fabs(value);
    return all < size / 2 ? all / (size - all) : INFINITY;
  }
  bool is_zero() const { return value == 0 && error + tail == 0; }
};

inline Amount operator+(const Amount& a, const Amount& b) {
  const double sum = a.value + b.value;
  return {sum, a.error + b.error + 2 * half_ulp * std::fabs(sum), a.tail + b.tail};
}

inline Amount operator*(double factor, const Amount& a) {
  const double value = factor * a.value;
  return {value, factor * a.error + 2 * half_ulp * std::fabs(value), factor * a.tail};
}

// a / b, b certainly not zero.
inline Amount ratio(const Amount& a, const Amount& b) {
  if (a.is_zero()) return {};
  const double value = a.value / b.value;
  const double loss = b.relative();
  if (!(loss < 0.5)) return {value, INFINITY, 0};
  const double size = std::fabs(value);
  const double from_b = b.error / b.value / (1 - loss);
  const double tail_from_b = b.tail / b.value / (1 - loss);
  const double stretch = 1 / (1 - loss);
  return {value, (a.error / b.value * stretch + size * from_b) + 2 * half_ulp * size,
          a.tail / b.value * stretch + size * tail_from_b};
}

}  // namespace heraldgauge::fast
