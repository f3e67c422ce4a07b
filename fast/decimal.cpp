#include <cmath>

#include "fast/evaluate.hpp"
#include "reference/model/rational.hpp"

namespace heraldgauge::fast {
namespace {

using model::Integer;
using model::Rational;

constexpr int digits = 17;

Rational power_of(unsigned long base, long exponent) {
  Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), base, static_cast<unsigned long>(std::labs(exponent)));
  return exponent < 0 ? Rational(1) / power : Rational(power);
}

// The nearest integer, ties to even.
Integer nearest(const Rational& x) {
  const Rational doubled = 2 * x + 1;
  Integer result;
  mpz_fdiv_q(result.get_mpz_t(), doubled.get_num_mpz_t(), Integer(2 * doubled.get_den()).get_mpz_t());
  const bool tie = doubled.get_den() == 1 && mpz_even_p(doubled.get_num_mpz_t());
  if (tie && mpz_odd_p(result.get_mpz_t())) result -= 1;
  return result;
}

}  // namespace

std::string decimal(const Scaled& value) {
  if (value.significand == 0) return "0";
  const Rational size = Rational(std::fabs(value.significand)) * power_of(2, value.exponent);
  const double log2 = std::log2(std::fabs(value.significand)) + static_cast<double>(value.exponent);
  long exponent = static_cast<long>(std::floor(log2 * std::log10(2.0)));
  while (size < power_of(10, exponent)) --exponent;
  while (size >= power_of(10, exponent + 1)) ++exponent;
  std::string text = nearest(size * power_of(10, digits - 1 - exponent)).get_str();
  if (text.size() > digits) {  // rounded up to the next power of ten
    text.pop_back();
    ++exponent;
  }
  text.insert(1, ".");
  return (value.significand < 0 ? "-" : "") + text + "e" + std::to_string(exponent);
}

double to_binary64(const Scaled& value) {
  if (value.exponent > 4000) return std::copysign(INFINITY, value.significand);
  if (value.exponent < -4000) return std::copysign(0.0, value.significand);
  return std::ldexp(value.significand, static_cast<int>(value.exponent));
}

}  // namespace heraldgauge::fast
