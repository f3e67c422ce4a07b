// The rational operations of Interval against exact rationals, which no rounding can touch.
#include "reference/arithmetic/interval.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/random_rational.hpp"

namespace heraldgauge::reference {
namespace {

using test::ExactInterval;
using test::for_each_case;
using test::Random;
using test::random_interval;
using test::random_pair;
using test::random_rational;

Precision random_precision(Random& random) {
  constexpr std::array<Precision, 6> choices{2, 24, 53, 64, 113, 256};
  return choices[random() % choices.size()];
}

Interval enclosing(const ExactInterval& x, Precision bits) { return {x.lower, x.upper, bits}; }

bool inside(const Interval& inner, const Interval& outer) {
  return mpfr_lessequal_p(&outer.raw()->left, &inner.raw()->left) != 0 &&
         mpfr_lessequal_p(&inner.raw()->right, &outer.raw()->right) != 0;
}

// 2^(1 - bits) max |x|: an upper bound on one unit of the last place of any number in x.
Rational last_place(const Interval& x) {
  const Rational largest = std::max(Rational(abs(x.lower())), Rational(abs(x.upper())));
  Rational unit;
  mpq_div_2exp(unit.get_mpq_t(), largest.get_mpq_t(), static_cast<mp_bitcnt_t>(x.precision() - 1));
  return unit;
}

double log2_of(const Rational& positive) {
  long above = 0, below = 0;
  const double numerator = mpz_get_d_2exp(&above, positive.get_num_mpz_t());
  const double denominator = mpz_get_d_2exp(&below, positive.get_den_mpz_t());
  return std::log2(numerator / denominator) + static_cast<double>(above - below);
}

template <class IntervalOperation, class ExactOperation>
void expect_contained(Random& random, IntervalOperation operation, ExactOperation exact, bool divides = false) {
  const Precision bits = random_precision(random);
  const auto [a, b] = random_pair(random);
  const Interval result = operation(enclosing(a, bits), enclosing(b, bits));
  for (const Rational& x : a.inside) {
    for (const Rational& y : b.inside) {
      if (divides && y == 0) continue;
      EXPECT_TRUE(result.contains(exact(x, y))) << x << " and " << y << " at " << bits << " bits";
    }
  }
}

TEST(Interval, AConversionContainsTheRationalAndIsAtMostOneLastPlaceWide) {
  for_each_case(4000, 101, [](Random& random) {
    const Precision bits = random_precision(random);
    const Rational x = random_rational(random);
    const Interval enclosed(x, bits);
    EXPECT_TRUE(enclosed.contains(x));
    EXPECT_LE(enclosed.upper() - enclosed.lower(), last_place(enclosed));
  });
}

TEST(Interval, SumsContainTheSums) {
  for_each_case(4000, 102, [](Random& random) {
    expect_contained(
        random, [](auto a, auto b) { return a + b; }, [](auto x, auto y) { return Rational(x + y); });
  });
}

TEST(Interval, DifferencesContainTheDifferences) {
  for_each_case(4000, 103, [](Random& random) {
    expect_contained(
        random, [](auto a, auto b) { return a - b; }, [](auto x, auto y) { return Rational(x - y); });
  });
}

TEST(Interval, ProductsContainTheProducts) {
  for_each_case(4000, 104, [](Random& random) {
    expect_contained(
        random, [](auto a, auto b) { return a * b; }, [](auto x, auto y) { return Rational(x * y); });
  });
}

TEST(Interval, QuotientsContainTheQuotients) {
  for_each_case(4000, 105, [](Random& random) {
    expect_contained(
        random, [](auto a, auto b) { return a / b; }, [](auto x, auto y) { return Rational(x / y); }, true);
  });
}

TEST(Interval, ExtremesContainTheExtremes) {
  for_each_case(2000, 106, [](Random& random) {
    expect_contained(
        random, [](auto a, auto b) { return larger_of(a, b); }, [](auto x, auto y) { return std::max(x, y); });
    expect_contained(
        random, [](auto a, auto b) { return smaller_of(a, b); }, [](auto x, auto y) { return std::min(x, y); });
  });
}

TEST(Interval, AHullContainsBothArguments) {
  for_each_case(2000, 107, [](Random& random) {
    expect_contained(
        random, [](auto a, auto b) { return hull(a, b); }, [](auto x, auto) { return x; });
    expect_contained(
        random, [](auto a, auto b) { return hull(a, b); }, [](auto, auto y) { return y; });
  });
}

TEST(Interval, SquaresPowersAndMagnitudesContainTheirsAndEvenOnesAreNeverNegative) {
  for_each_case(3000, 108, [](Random& random) {
    const Precision bits = random_precision(random);
    const ExactInterval a = random_interval(random);
    const Interval x = enclosing(a, bits);
    const unsigned long n = random() % 9;
    for (const Rational& value : a.inside) {
      Rational power(1);
      for (unsigned long i = 0; i < n; ++i) power *= value;
      EXPECT_TRUE(square(x).contains(value * value)) << value;
      EXPECT_TRUE(reference::power(x, n).contains(power)) << value << "^" << n;
      EXPECT_TRUE(absolute(x).contains(abs(value))) << value;
      EXPECT_TRUE((-x).contains(-value)) << value;
      EXPECT_TRUE((x * -7L).contains(-7 * value)) << value;
    }
    EXPECT_GE(square(x).lower(), 0);
    EXPECT_GE(absolute(x).lower(), 0);
  });
}

TEST(Interval, RestrictingKeepsExactlyWhatLiesInTheBounds) {
  for_each_case(2000, 109, [](Random& random) {
    const Precision bits = random_precision(random);
    const ExactInterval a = random_interval(random);
    const auto bounds = std::minmax({random_rational(random), a.inside[3]});
    const Interval result = restricted(enclosing(a, bits), bounds.first, bounds.second);
    for (const Rational& value : a.inside) {
      if (bounds.first <= value && value <= bounds.second) {
        EXPECT_TRUE(result.contains(value)) << value;
      }
    }
    EXPECT_GE(result.lower(), Interval(bounds.first, bits).lower());
    EXPECT_LE(result.upper(), Interval(bounds.second, bits).upper());
  });
}

TEST(Interval, RaisingMovesTheUpperEndAlone) {
  for_each_case(1000, 110, [](Random& random) {
    const Precision bits = random_precision(random);
    const ExactInterval a = random_interval(random);
    const Rational extra = abs(random_rational(random));
    const Interval result = raised(enclosing(a, bits), Interval(extra, bits));
    EXPECT_EQ(result.lower(), enclosing(a, bits).lower());
    EXPECT_TRUE(result.contains(a.upper + extra));
  });
}

TEST(Interval, MidpointsAndEndsAreThePointsTheyName) {
  for_each_case(1000, 111, [](Random& random) {
    const Interval x = enclosing(random_interval(random), random_precision(random));
    EXPECT_EQ(midpoint(x).lower(), midpoint(x).upper());
    EXPECT_TRUE(x.contains(midpoint(x).lower()));
    EXPECT_TRUE(lower_end(x).lower() == x.lower() && lower_end(x).upper() == x.lower());
    EXPECT_TRUE(upper_end(x).lower() == x.upper() && upper_end(x).upper() == x.upper());
  });
}

// Operations on numbers that the precision holds are rounded correctly: at most one last place wide, and not wide at
// all where the exact result is representable.
TEST(Interval, AnOperationOnPointsIsCorrectlyRounded) {
  for_each_case(3000, 112, [](Random& random) {
    const Precision bits = 64 + static_cast<Precision>(random() % 200);
    const Rational x = midpoint(Interval(random_rational(random), bits)).lower();
    const Rational y = midpoint(Interval(random_rational(random), bits)).lower();
    const Interval a(x, bits), b(y, bits);
    ASSERT_EQ(a.lower(), a.upper());
    for (const Interval& result : {a + b, a - b, a * b, square(a), y == 0 ? a : a / b}) {
      EXPECT_LE(result.upper() - result.lower(), last_place(result)) << x << " and " << y;
    }
    const Interval doubled = a + a;
    EXPECT_EQ(doubled.lower(), doubled.upper());
  });
}

// Rounding outward at twice the precision can only shrink a result, through any expression.
TEST(Interval, ResultsAtTwiceThePrecisionAreNestedInside) {
  for_each_case(3000, 113, [](Random& random) {
    const Precision bits = random_precision(random);
    const auto [a, b] = random_pair(random);
    const ExactInterval c = random_interval(random);
    const auto expression = [&](Precision p) {
      const Interval x = enclosing(a, p), y = enclosing(b, p), z = enclosing(c, p);
      return (x * y - z) / (square(x) + Interval(1L, p)) + y * z;
    };
    EXPECT_TRUE(inside(expression(2 * bits), expression(bits))) << a.lower << ", " << b.lower << ", " << c.lower;
  });
}

TEST(Interval, TheInPlaceOperationsMayWriteOverAnOperand) {
  for_each_case(1000, 114, [](Random& random) {
    const Precision bits = random_precision(random);
    const auto [a, b] = random_pair(random);
    const Interval x = enclosing(a, bits), y = enclosing(b, bits);
    const auto same = [&](auto in_place, const Interval& expected) {
      Interval over_first = x, over_second = y;
      in_place(over_first, over_first, y);
      in_place(over_second, x, over_second);
      EXPECT_TRUE(inside(over_first, expected) && inside(expected, over_first));
      EXPECT_TRUE(inside(over_second, expected) && inside(expected, over_second));
    };
    same(Interval::add, x + y);
    same(Interval::subtract, x - y);
    same(Interval::multiply, x * y);
    same(Interval::divide, x / y);
  });
}

TEST(Interval, ComparisonsAreCertainOrSilent) {
  for_each_case(2000, 115, [](Random& random) {
    const Precision bits = random_precision(random);
    const auto [a, b] = random_pair(random);
    const Interval x = enclosing(a, bits), y = enclosing(b, bits);
    if (certainly_less(x, y)) {
      EXPECT_LT(a.upper, b.lower);
    }
    if (!overlap(x, y)) {
      EXPECT_TRUE(a.upper < b.lower || b.upper < a.lower);
    }
    EXPECT_EQ(overlap(x, y), !certainly_less(x, y) && !certainly_less(y, x));
    if (x.is_certainly_positive()) {
      EXPECT_GT(a.lower, 0);
    }
    if (x.is_certainly_negative()) {
      EXPECT_LT(a.upper, 0);
    }
    if (a.lower <= 0 && a.upper >= 0) {
      EXPECT_TRUE(x.contains_zero());
    }
  });
}

TEST(Interval, WidthAndMignitudeBoundTheExactOnes) {
  for_each_case(1000, 116, [](Random& random) {
    const ExactInterval a = random_interval(random);
    const Interval x = enclosing(a, 113);
    const Rational width = x.upper() - x.lower();
    if (width > 0) {
      EXPECT_NEAR(x.log2_width(), log2_of(width), 1e-9);
    } else {
      EXPECT_EQ(x.log2_width(), -std::numeric_limits<double>::infinity());
    }
    if (x.contains_zero()) {
      EXPECT_EQ(x.log2_mignitude(), -std::numeric_limits<double>::infinity());
    } else {
      const Rational nearest = std::min(Rational(abs(x.lower())), Rational(abs(x.upper())));
      EXPECT_NEAR(x.log2_mignitude(), log2_of(nearest), 1e-9);
    }
  });
}

// Far below binary64: a hundred-station herald probability must not underflow.
TEST(Interval, KeepsRelativePrecisionFarBelowBinary64) {
  const Interval tiny = power(Interval(Rational(1, 1000), 128), 20000);
  EXPECT_TRUE(tiny.is_certainly_positive());
  EXPECT_NEAR(tiny.log2_mignitude(), -60000 * std::log2(10.0), 1e-3);
  EXPECT_LT(tiny.log2_width() - tiny.log2_mignitude(), -100);
}

}  // namespace
}  // namespace heraldgauge::reference
