#include "fast/evaluate.hpp"

#include <cmath>

namespace heraldgauge::fast {

double to_binary64(const Scaled& value) {
  if (value.exponent > 4000) return std::copysign(INFINITY, value.significand);
  if (value.exponent < -4000) return std::copysign(0.0, value.significand);
  return std::ldexp(value.significand, static_cast<int>(value.exponent));
}

}  // namespace heraldgauge::fast
