#include "compare/digits.hpp"

#include <gtest/gtest.h>

namespace heraldgauge::compare {
namespace {

using model::Rational;

reference::Enclosure exactly(const Rational& value) { return {value, value}; }

Rational ratio(long numerator, long denominator) {
  Rational value(numerator, denominator);
  value.canonicalize();
  return value;
}

TEST(AgreeingDigits, AreTheFloorOfTheNegativeLogarithm) {
  EXPECT_EQ(agreeing_digits(ratio(1001, 1000), exactly(1)), 3);  // error exactly 1e-3
  EXPECT_EQ(agreeing_digits(ratio(10011, 10000), exactly(1)), 2);
  EXPECT_EQ(agreeing_digits(ratio(10009, 10000), exactly(1)), 3);
  EXPECT_EQ(agreeing_digits(ratio(-999, 1000), exactly(-1)), 3);
}

TEST(AgreeingDigits, StayBetweenZeroAndNinetyNine) {
  EXPECT_EQ(agreeing_digits(5, exactly(1)), 0);
  EXPECT_EQ(agreeing_digits(-1, exactly(1)), 0);
  EXPECT_EQ(agreeing_digits(ratio(1, 3), exactly(ratio(1, 3))), 99);
  EXPECT_EQ(agreeing_digits(0, exactly(0)), 99);
  EXPECT_EQ(agreeing_digits(ratio(1, 1000), exactly(0)), 0);
}

TEST(AgreeingDigits, CountTheWorstThatTheEnclosureAllows) {
  // The value is the middle; each end is off by 1/2001 or 1/1999, so three digits and no more.
  EXPECT_EQ(agreeing_digits(1, {ratio(1999, 2000), ratio(2001, 2000)}), 3);
  EXPECT_EQ(agreeing_digits(ratio(2001, 2000), {ratio(1999, 2000), ratio(2001, 2000)}), 2);
  EXPECT_EQ(agreeing_digits(0, {-1, 1}), 0);
}

}  // namespace
}  // namespace heraldgauge::compare
