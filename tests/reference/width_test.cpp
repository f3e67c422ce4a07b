#include "reference/width.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace heraldgauge::reference {
namespace {

// [1, 1 + 2^-10]: exact ends, three digits and a little.
const Interval three_digits(Rational(1), Rational(1025, 1024), 128);

TEST(Width, IsNarrowEnoughWithOneDigitToSpare) {
  EXPECT_TRUE(is_narrow_enough(three_digits, std::nullopt, 2));
  EXPECT_FALSE(is_narrow_enough(three_digits, std::nullopt, 3));
}

TEST(Width, MayReferToALargerScale) {
  EXPECT_TRUE(is_narrow_enough(three_digits, Interval(1000L, 128), 5));
  const Interval around_zero(Rational(-1, 256), Rational(1, 256), 128);
  EXPECT_FALSE(is_narrow_enough(around_zero, std::nullopt, 1));
  EXPECT_TRUE(is_narrow_enough(around_zero, Interval(1L, 128), 1));
}

TEST(Width, CountsTheBitsThatAreMissing) {
  // log2 of width * 10^(digits + 1)
  EXPECT_NEAR(missing_bits(three_digits, std::nullopt, 2).value(), std::log2(1e3 / 1024), 1e-9);
  EXPECT_NEAR(missing_bits(three_digits, std::nullopt, 3).value(), std::log2(1e4 / 1024), 1e-9);
  EXPECT_EQ(missing_bits(Interval(Rational(-1), Rational(1), 128), std::nullopt, 3), std::nullopt);
}

TEST(Width, CountsCertifiedDigits) {
  EXPECT_EQ(certified_digits(three_digits, std::nullopt, 2), 2);
  EXPECT_EQ(certified_digits(three_digits, std::nullopt, 30), 3);
  EXPECT_EQ(certified_digits(Interval(Rational(-1), Rational(1), 128), std::nullopt, 30), 0);
  EXPECT_EQ(certified_digits(Interval(7L, 128), std::nullopt, 30), digits_of_exact);
}

}  // namespace
}  // namespace heraldgauge::reference
