// Printed bounds, read back exactly, still enclose.
#include <gtest/gtest.h>

#include "reference/arithmetic/decimal.hpp"
#include "reference/model/exact_number.hpp"
#include "tests/support/random_rational.hpp"

namespace heraldgauge::reference {
namespace {

using test::for_each_case;
using test::Random;

Rational power_of_ten(long exponent) {
  Rational power;
  mpz_ui_pow_ui(power.get_num_mpz_t(), 10, static_cast<unsigned long>(std::abs(exponent)));
  return exponent < 0 ? Rational(1 / power) : power;
}

Rational read_back(const std::string& text) {
  const auto value = model::parse_exact(text);
  EXPECT_TRUE(value) << text;
  return value ? *value : Rational(0);
}

// Digits from the first to the last that is not zero.
std::size_t significant_digits(const std::string& text) {
  std::string digits;
  for (const char c : text.substr(0, text.find('e'))) {
    if (c >= '0' && c <= '9') digits += c;
  }
  const std::size_t first = digits.find_first_not_of('0');
  return first == std::string::npos ? 1 : digits.find_last_not_of('0') - first + 1;
}

TEST(DecimalRoundTrip, PrintedBoundsStillEnclose) {
  for_each_case(20000, 301, [](Random& random) {
    const Rational x = test::random_rational(random);
    const int digits = 1 + static_cast<int>(random() % 40);
    const Rational below = read_back(decimal(x, digits, Direction::down));
    const Rational above = read_back(decimal(x, digits, Direction::up));
    EXPECT_LE(below, x);
    EXPECT_GE(above, x);
    if (x == 0) return;
    const Rational unit = power_of_ten(decimal_exponent(x) - digits + 1);
    EXPECT_LE(above - below, unit) << x << " to " << digits;
    EXPECT_EQ(above == below, x / unit == Rational(Rational(x / unit).get_num())) << x;
    const Rational nearest = read_back(decimal(x, digits, Direction::nearest));
    EXPECT_LE(abs(nearest - x), unit / 2) << x << " to " << digits;
  });
}

TEST(DecimalRoundTrip, NoMoreDigitsThanAskedAreWritten) {
  for_each_case(5000, 302, [](Random& random) {
    const Rational x = test::random_rational(random, test::Spread::log_uniform);
    const int digits = 1 + static_cast<int>(random() % 40);
    for (const Direction direction : {Direction::down, Direction::up, Direction::nearest}) {
      const std::string text = decimal(x, digits, direction);
      EXPECT_LE(significant_digits(text), static_cast<std::size_t>(digits)) << text;
    }
  });
}

TEST(DecimalRoundTrip, TheExponentIsThatOfTheLeadingDigit) {
  for_each_case(3000, 303, [](Random& random) {
    const Rational x = test::random_rational(random);
    if (x == 0) return;
    EXPECT_LE(power_of_ten(decimal_exponent(x)), abs(x));
    EXPECT_GT(power_of_ten(decimal_exponent(x) + 1), abs(x));
  });
  for (long exponent = -400; exponent <= 400; exponent += 25) {
    EXPECT_EQ(decimal_exponent(power_of_ten(exponent)), exponent);
    EXPECT_EQ(decimal_exponent(power_of_ten(exponent) * Rational(999999, 1000000)), exponent - 1);
  }
}

TEST(DecimalRoundTrip, AValueFarBelowBinary64KeepsItsExponent) {
  EXPECT_EQ(decimal(power_of_ten(-46000) * Rational(5, 4), 10, Direction::down), "1.25e-46000");
  EXPECT_EQ(decimal(-power_of_ten(9000) / 3, 3, Direction::up), "-3.33e8999");
}

}  // namespace
}  // namespace heraldgauge::reference
