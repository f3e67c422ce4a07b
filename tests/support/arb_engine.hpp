#pragma once
// Arb ball arithmetic as the second interval engine: elementary functions enclosed by code that shares nothing with
// MPFI.

#include <optional>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::test {

enum class Elementary {
  square_root,
  exponential,
  exponential_m1,
  power_of_ten,
  logarithm,
  binary_logarithm,
  logarithm_1p,
  hyperbolic_tangent,
  cosine,
  sine,
};

// f over a bounded x, rounded outward to an interval of `bits`; none where Arb gives no finite ball.
std::optional<reference::Interval> arb_value(Elementary f, const reference::Interval& x, reference::Precision bits);
reference::Interval arb_pi(reference::Precision bits);
reference::Interval arb_log_of_2(reference::Precision bits);

}  // namespace heraldgauge::test
