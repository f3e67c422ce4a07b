#include "reference/arithmetic/decimal.hpp"

#include <gtest/gtest.h>

namespace heraldgauge::reference {
namespace {

using model::Rational;

TEST(Decimal, RoundsInTheStatedDirection) {
  EXPECT_EQ(decimal(Rational(1, 3), 3, Direction::down), "0.333");
  EXPECT_EQ(decimal(Rational(1, 3), 3, Direction::up), "0.334");
  EXPECT_EQ(decimal(Rational(-1, 3), 3, Direction::down), "-0.334");
  EXPECT_EQ(decimal(Rational(-1, 3), 3, Direction::up), "-0.333");
  EXPECT_EQ(decimal(Rational(2, 3), 3, Direction::nearest), "0.667");
}

TEST(Decimal, TiesGoToEven) {
  EXPECT_EQ(decimal(Rational(25, 2), 2, Direction::nearest), "12");
  EXPECT_EQ(decimal(Rational(27, 2), 2, Direction::nearest), "14");
  EXPECT_EQ(decimal(Rational(-25, 2), 2, Direction::nearest), "-12");
}

TEST(Decimal, CarriesIntoTheNextPower) {
  EXPECT_EQ(decimal(Rational(9999, 10000), 3, Direction::up), "1");
  EXPECT_EQ(decimal(Rational(9999, 10000), 3, Direction::down), "0.999");
}

TEST(Decimal, WritesLargeAndSmallNumbersWithAnExponent) {
  EXPECT_EQ(decimal(Rational(0), 5, Direction::down), "0");
  EXPECT_EQ(decimal(Rational(1250), 5, Direction::down), "1250");
  EXPECT_EQ(decimal(Rational("1/800000000"), 5, Direction::down), "1.25e-9");
  EXPECT_EQ(decimal(Rational("12300000000000"), 5, Direction::down), "1.23e13");
  EXPECT_EQ(decimal(Rational("1/100000"), 5, Direction::down), "0.00001");
}

}  // namespace
}  // namespace heraldgauge::reference
