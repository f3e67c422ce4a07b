// What Interval answers where there is no number to answer with: it claims nothing, and never something false.
#include <gtest/gtest.h>

#include <utility>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference {
namespace {

constexpr Precision bits = 64;

Interval from_to(long lower, long upper) { return {Rational(lower), Rational(upper), bits}; }

bool is_whole_line(const Interval& x) { return mpfi_inf_p(x.raw()) != 0 && x.contains_zero() && !x.is_bounded(); }

bool has_nan(const Interval& x) { return mpfi_nan_p(x.raw()) != 0; }

TEST(IntervalLimits, DividingByAnIntervalThatContainsZeroIsUnbounded) {
  const Interval one = from_to(1, 1);
  EXPECT_TRUE(is_whole_line(one / from_to(-1, 1)));
  EXPECT_TRUE(is_whole_line(one / from_to(0, 0)));
  EXPECT_TRUE(is_whole_line(from_to(0, 0) / from_to(-1, 1)));
  const Interval above_one = one / from_to(0, 1);
  EXPECT_FALSE(above_one.is_bounded());
  EXPECT_TRUE(above_one.contains(1) && above_one.contains(Rational("10000000000000000000000")));
  EXPECT_FALSE(above_one.contains(Rational(1, 2)));
}

TEST(IntervalLimits, ZeroByZeroClaimsNothing) {
  const Interval undefined = from_to(0, 0) / from_to(0, 0);
  EXPECT_TRUE(is_whole_line(undefined));
  EXPECT_FALSE(has_nan(undefined));
  Interval in_place = from_to(0, 0);
  in_place /= from_to(0, 0);
  EXPECT_TRUE(is_whole_line(in_place));
}

// max(NaN, 0) would be 0 in MPFR: an undefined quotient would become a certified zero.
TEST(IntervalLimits, AnUndefinedOperandDoesNotVanishInAMaximum) {
  const Interval undefined = from_to(0, 0) / from_to(0, 0);
  EXPECT_FALSE(larger_of(undefined, from_to(0, 0)).is_bounded());
  EXPECT_TRUE(larger_of(undefined, from_to(0, 0)).contains(5));
  EXPECT_TRUE(smaller_of(undefined, from_to(0, 0)).contains(-5));
}

TEST(IntervalLimits, FunctionsOutsideTheirDomainClaimNothing) {
  for (const Interval& x : {from_to(-2, -1), from_to(-2, 1)}) {
    EXPECT_TRUE(is_whole_line(square_root(x)));
    EXPECT_TRUE(is_whole_line(logarithm(x)));
    EXPECT_TRUE(is_whole_line(binary_logarithm(x)));
    EXPECT_TRUE(is_whole_line(logarithm_1p(x)));
  }
  EXPECT_TRUE(is_whole_line(logarithm(from_to(0, 0))));
  EXPECT_FALSE(logarithm(from_to(0, 1)).is_bounded());
  EXPECT_TRUE(logarithm(from_to(0, 1)).contains(-1000000));
}

TEST(IntervalLimits, ArithmeticOnUnboundedIntervalsNeverGivesNan) {
  const Interval line = from_to(1, 1) / from_to(-1, 1);
  const Interval right = from_to(1, 1) / from_to(0, 1);
  const Interval left = from_to(-1, -1) / from_to(0, 1);
  const std::array<Interval, 7> all{line, right, left, from_to(0, 0), from_to(0, 1), from_to(-1, 1), from_to(2, 2)};
  for (const Interval& a : all) {
    for (const Interval& b : all) {
      for (const Interval& result : {a + b, a - b, a * b, a / b, hull(a, b), larger_of(a, b), smaller_of(a, b)}) {
        EXPECT_FALSE(has_nan(result));
        EXPECT_TRUE(mpfr_lessequal_p(&result.raw()->left, &result.raw()->right));
      }
    }
    for (const Interval& result :
         {square(a), absolute(a), exponential(a), power_of_ten(a), hyperbolic_tangent(a), cosine(a), sine(a),
          square_root(a), logarithm(a), logarithm_1p(a), midpoint(a), -a, a * 0L, a * 3L, power(a, 3)}) {
      EXPECT_FALSE(has_nan(result));
    }
  }
}

TEST(IntervalLimits, ZeroTimesTheWholeLineIsZero) {
  const Interval product = from_to(0, 0) * (from_to(1, 1) / from_to(-1, 1));
  EXPECT_TRUE(product.is_exactly_zero());
}

TEST(IntervalLimits, RestrictingToWhatAnIntervalDoesNotMeetClaimsNothing) {
  EXPECT_TRUE(is_whole_line(restricted(from_to(2, 3), 0, 1)));
  EXPECT_TRUE(restricted(from_to(1, 3), 0, 1).contains(1));
}

// The sign of a zero end must not decide between "contains 0" and not, nor flip an unbounded quotient.
TEST(IntervalLimits, SignedZerosAreZero) {
  const Interval negative_zero = from_to(0, 0) * from_to(-1, -1);
  EXPECT_TRUE(negative_zero.is_exactly_zero() && negative_zero.contains_zero());
  EXPECT_FALSE(negative_zero.is_certainly_negative() || negative_zero.is_certainly_positive());
  EXPECT_TRUE(is_whole_line(from_to(1, 1) / negative_zero));
  EXPECT_TRUE(square_root(negative_zero).is_exactly_zero());
  EXPECT_TRUE(overlap(negative_zero, from_to(0, 0)));
  EXPECT_FALSE(certainly_less(negative_zero, from_to(0, 0)));
  const Interval from_minus_one = from_to(0, 1) * from_to(-1, -1);
  const Interval quotient = from_to(1, 1) / from_minus_one;
  EXPECT_TRUE(quotient.contains(-1) && quotient.contains(-1000000));
}

TEST(IntervalLimits, AMovedFromObjectCanBeAssignedToAndMovedOn) {
  Interval first = from_to(1, 2);
  Interval second = std::move(first);
  EXPECT_TRUE(second.contains(2));
  first = second;
  EXPECT_TRUE(first.contains(1));
  Interval third = std::move(second);
  second = std::move(first);
  EXPECT_TRUE(second.contains(1) && third.contains(2));
  first = Interval(Rational(1, 3), 200);
  EXPECT_EQ(first.precision(), 200);
  EXPECT_TRUE(first.contains(Rational(1, 3)));
}

TEST(IntervalLimits, AssignmentTakesThePrecisionAndSelfAssignmentKeepsTheValue) {
  Interval x(Rational(1, 3), 40);
  x = Interval(Rational(2, 3), 90);
  EXPECT_EQ(x.precision(), 90);
  const Interval& same = x;
  x = same;
  EXPECT_TRUE(x.contains(Rational(2, 3)));
  EXPECT_EQ((x + Interval(1L, 200)).precision(), 200);
}

}  // namespace
}  // namespace heraldgauge::reference
