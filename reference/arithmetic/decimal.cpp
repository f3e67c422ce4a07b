#include "reference/arithmetic/decimal.hpp"

#include <cmath>

namespace heraldgauge::reference {
namespace {

using model::Integer;
using model::Rational;

constexpr long smallest_plain_exponent = -5;  // 0.00001 is still written in full
constexpr long zeros_allowed_after = 6;       // 1000000 is still written in full

Integer power_of_ten(long exponent) {
  Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(exponent));
  return power;
}

Rational scaled_by_power_of_ten(const Rational& x, long exponent) {
  return exponent >= 0 ? Rational(x * power_of_ten(exponent)) : Rational(x / power_of_ten(-exponent));
}

// The integer next to x in the direction.
Integer rounded(const Rational& x, Direction direction) {
  Integer result;
  switch (direction) {
    case Direction::down:
      mpz_fdiv_q(result.get_mpz_t(), x.get_num_mpz_t(), x.get_den_mpz_t());
      return result;
    case Direction::up:
      mpz_cdiv_q(result.get_mpz_t(), x.get_num_mpz_t(), x.get_den_mpz_t());
      return result;
    case Direction::nearest:
      break;
  }
  const Rational doubled = 2 * x + 1;
  mpz_fdiv_q(result.get_mpz_t(), doubled.get_num_mpz_t(), Integer(2 * doubled.get_den()).get_mpz_t());
  const bool tie = doubled.get_den() == 1 && mpz_even_p(doubled.get_num_mpz_t());
  if (tie && mpz_odd_p(result.get_mpz_t())) result -= 1;
  return result;
}

// digits * 10^exponent with the trailing zeros of digits dropped.
std::string written(std::string digits, long exponent) {
  while (digits.size() > 1 && digits.back() == '0') {
    digits.pop_back();
    ++exponent;
  }
  const long count = static_cast<long>(digits.size());
  const long leading = exponent + count - 1;  // decimal exponent of the first digit
  if (exponent >= 0 && exponent <= zeros_allowed_after)
    return digits + std::string(static_cast<std::size_t>(exponent), '0');
  if (exponent < 0 && leading >= 0) return digits.insert(static_cast<std::size_t>(leading + 1), ".");
  if (exponent < 0 && leading >= smallest_plain_exponent) {
    return "0." + std::string(static_cast<std::size_t>(-leading - 1), '0') + digits;
  }
  if (count > 1) digits.insert(1, ".");
  return digits + "e" + std::to_string(leading);
}

}  // namespace

long decimal_exponent(const Rational& x) {
  const Rational magnitude = abs(x);
  long numerator_exponent = 0;
  long denominator_exponent = 0;
  const double numerator = mpz_get_d_2exp(&numerator_exponent, magnitude.get_num_mpz_t());
  const double denominator = mpz_get_d_2exp(&denominator_exponent, magnitude.get_den_mpz_t());
  const double log2 =
      std::log2(numerator / denominator) + static_cast<double>(numerator_exponent - denominator_exponent);
  long exponent = static_cast<long>(std::floor(log2 * std::log10(2.0)));
  while (magnitude < scaled_by_power_of_ten(1, exponent)) --exponent;
  while (magnitude >= scaled_by_power_of_ten(1, exponent + 1)) ++exponent;
  return exponent;
}

std::string decimal(const Rational& x, int digits, Direction direction) {
  if (x == 0) return "0";
  const long exponent = decimal_exponent(x) - digits + 1;
  const Integer significand = rounded(scaled_by_power_of_ten(x, -exponent), direction);
  const std::string sign = significand < 0 ? "-" : "";
  return sign + written(Integer(abs(significand)).get_str(), exponent);
}

}  // namespace heraldgauge::reference
