#include "tests/support/arb_engine.hpp"

#include "tests/support/ball.hpp"

namespace heraldgauge::test {
namespace {

using reference::Interval;
using reference::Precision;

void evaluate(Elementary f, arb_ptr y, arb_srcptr x, Precision bits) {
  Ball ten;
  switch (f) {
    case Elementary::square_root:
      return arb_sqrt(y, x, bits);
    case Elementary::exponential:
      return arb_exp(y, x, bits);
    case Elementary::exponential_m1:
      return arb_expm1(y, x, bits);
    case Elementary::power_of_ten:
      arb_set_ui(ten.raw(), 10);
      return arb_pow(y, ten.raw(), x, bits);
    case Elementary::logarithm:
      return arb_log(y, x, bits);
    case Elementary::binary_logarithm:
      return arb_log_base_ui(y, x, 2, bits);
    case Elementary::logarithm_1p:
      return arb_log1p(y, x, bits);
    case Elementary::hyperbolic_tangent:
      return arb_tanh(y, x, bits);
    case Elementary::cosine:
      return arb_cos(y, x, bits);
    case Elementary::sine:
      return arb_sin(y, x, bits);
  }
}

}  // namespace

std::optional<Interval> arb_value(Elementary f, const Interval& x, Precision bits) {
  Ball argument, value;
  arb_set_interval_mpfr(argument.raw(), &x.raw()->left, &x.raw()->right, bits);
  evaluate(f, value.raw(), argument.raw(), bits);
  if (!arb_is_finite(value.raw())) return std::nullopt;
  return interval_of(value, bits);
}

Interval arb_pi(Precision bits) {
  Ball value;
  arb_const_pi(value.raw(), bits);
  return interval_of(value, bits);
}

Interval arb_log_of_2(Precision bits) {
  Ball value;
  arb_const_log2(value.raw(), bits);
  return interval_of(value, bits);
}

}  // namespace heraldgauge::test
