#include "reference/model/exact_number.hpp"

namespace heraldgauge::model {
namespace {

constexpr long significand_bits = 53;
constexpr long smallest_unit_exponent = -1074;  // of the subnormal numbers
constexpr long overflow_exponent = 1024;

long bit_length(const Integer& x) { return static_cast<long>(mpz_sizeinbase(x.get_mpz_t(), 2)); }

// x * 2^exponent for exponent >= 0, and x otherwise.
Integer scaled_up(const Integer& x, long exponent) {
  return exponent > 0 ? Integer(x << static_cast<unsigned long>(exponent)) : x;
}

// floor(log2(numerator / denominator)) for positive arguments.
long floor_log2(const Integer& numerator, const Integer& denominator) {
  const long guess = bit_length(numerator) - bit_length(denominator);  // the answer or the answer plus one
  return scaled_up(numerator, -guess) < scaled_up(denominator, guess) ? guess - 1 : guess;
}

// numerator / denominator to the nearest integer, ties to even.
Integer nearest_integer(const Integer& numerator, const Integer& denominator) {
  Integer quotient, remainder;
  mpz_tdiv_qr(quotient.get_mpz_t(), remainder.get_mpz_t(), numerator.get_mpz_t(), denominator.get_mpz_t());
  const int side = cmp(Integer(2 * remainder), denominator);
  if (side > 0 || (side == 0 && mpz_odd_p(quotient.get_mpz_t()))) ++quotient;
  return quotient;
}

}  // namespace

Expected<Rational> nearest_binary64(const Rational& x) {
  if (x == 0) return Rational(0);
  const Integer numerator = abs(x.get_num());
  const Integer& denominator = x.get_den();
  const long unit = std::max(floor_log2(numerator, denominator) - (significand_bits - 1), smallest_unit_exponent);
  const Integer units = nearest_integer(scaled_up(numerator, -unit), scaled_up(denominator, unit));
  if (bit_length(units) + unit > overflow_exponent) {
    return Fault{{}, "the number is beyond the range of binary64", "a magnitude below 1.7976931348623159e308"};
  }
  const Rational magnitude =
      unit >= 0 ? Rational(scaled_up(units, unit)) : Rational(units, scaled_up(Integer(1), -unit));
  Rational rounded = sgn(x) < 0 ? Rational(-magnitude) : magnitude;
  rounded.canonicalize();
  return rounded;
}

}  // namespace heraldgauge::model
