#include "reference/arithmetic/binary_entropy.hpp"

#include <gtest/gtest.h>

#include "tests/support/arb_engine.hpp"
#include "tests/support/published.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using test::arb_value;
using test::Elementary;
using test::for_each_case;
using test::Random;

constexpr Precision bits = 160;

// h2 of a rational in (0,1) from Arb's logarithms at far higher precision.
Interval by_arb(const Rational& x) {
  const Precision high = 4 * bits + 2200;
  const Interval p(x, high), q(Rational(1 - x), high);
  return -p * *arb_value(Elementary::binary_logarithm, p, high) - q * *arb_value(Elementary::binary_logarithm, q, high);
}

Rational random_probability(Random& random) {
  const Rational small(test::log_uniform(random, 1e-300, 0.5));
  switch (random() % 4) {
    case 0:
      return small;
    case 1:
      return 1 - small;
    case 2:
      return Rational(1, 2) + Rational(test::uniform(random, -1e-12, 1e-12));
    default:
      return Rational(test::uniform(random, 1e-9, 1 - 1e-9));
  }
}

TEST(BinaryEntropy, IsExactlyZeroAtTheEndsAndOneInTheMiddle) {
  EXPECT_TRUE(binary_entropy(Interval(0L, bits)).is_exactly_zero());
  EXPECT_TRUE(binary_entropy(Interval(1L, bits)).is_exactly_zero());
  const Interval half = binary_entropy(Interval(Rational(1, 2), bits));
  EXPECT_EQ(half.upper(), 1);
  EXPECT_GT(half.lower(), 1 - Rational("1/100000000000000000000000000000000000000000000"));
}

TEST(BinaryEntropy, OverlapsArbAndLosesNoDigitsNearZero) {
  for_each_case(800, 401, [](Random& random) {
    const Rational x = random_probability(random);
    const Interval argument(x, bits);
    const Interval value = binary_entropy(argument);
    EXPECT_TRUE(overlap(value, by_arb(x))) << x;
    if (argument.log2_width() < -1e6) {  // x itself is representable: only the evaluation widens
      EXPECT_LE(value.log2_width() - value.log2_mignitude(), 5.0 - static_cast<double>(bits)) << x;
    }
  });
}

// Over an interval the enclosure is the range: no wider than h2 at the ends and, where it is inside, the maximum at
// 1/2.
TEST(BinaryEntropy, TheRangeOverAnIntervalIsThatOfItsMonotonePieces) {
  for_each_case(800, 402, [](Random& random) {
    const auto [least, most] = std::minmax({random_probability(random), random_probability(random)});
    const Interval x(least, most, bits);
    const Interval range = binary_entropy(x);
    const Interval first = binary_entropy(lower_end(x)), second = binary_entropy(upper_end(x));
    EXPECT_EQ(range.lower(), std::min(first.lower(), second.lower()));
    const bool passes_maximum = least <= Rational(1, 2) && most >= Rational(1, 2);
    EXPECT_EQ(range.upper(), passes_maximum ? Rational(1) : std::max(first.upper(), second.upper()));
    EXPECT_TRUE(overlap(range, by_arb((least + most) / 2)));
  });
}

TEST(BinaryEntropy, AnIntervalThatTouchesZeroIsTightThere) {
  const Interval range = binary_entropy(Interval(Rational(0), Rational("1/1000000000000000000000000000000"), bits));
  EXPECT_EQ(range.lower(), 0);
  EXPECT_LT(range.upper(), Rational("2/10000000000000000000000000000"));
}

// Rounding may push an error rate a hair outside [0,1]; only what lies inside counts.
TEST(BinaryEntropy, WhatLiesOutsideTheProbabilitiesDoesNotCount) {
  const Rational hair("1/1000000000000000000000000000000");
  const Interval low = binary_entropy(Interval(Rational(-hair), hair, bits));
  EXPECT_TRUE(low.is_bounded());
  EXPECT_EQ(low.lower(), 0);
  const Interval high = binary_entropy(Interval(Rational(1 - hair), Rational(1 + hair), bits));
  EXPECT_TRUE(high.is_bounded());
  EXPECT_EQ(high.lower(), 0);
}

}  // namespace
}  // namespace heraldgauge::reference
