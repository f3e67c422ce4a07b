#include "reference/optics/angles.hpp"

#include <gtest/gtest.h>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Rational;

TEST(Angles, KnowEveryRationalCosine) {
  EXPECT_EQ(rational_cosine(0), Rational(1));
  EXPECT_EQ(rational_cosine(-60), Rational(1, 2));
  EXPECT_EQ(rational_cosine(450), Rational(0));
  EXPECT_EQ(rational_cosine(-240), Rational(-1, 2));
  EXPECT_EQ(rational_cosine(540), Rational(-1));
  EXPECT_EQ(rational_cosine(45), std::nullopt);
  EXPECT_EQ(rational_cosine(Rational(121, 2)), std::nullopt);
}

TEST(Angles, CosineAndSineAreTightAndLieOnTheCircle) {
  test::for_each_case(200, 50261, [](test::Random& random) {
    const Rational degrees(test::uniform(random, -1e4, 1e4));
    const Interval c = cosine_of_degrees(degrees, 200), s = sine_of_degrees(degrees, 200);
    EXPECT_TRUE((square(c) + square(s)).contains(1));
    EXPECT_LT(c.log2_width() - c.log2_mignitude(), -195) << "relative, also near the zeros";
    EXPECT_LT(s.log2_width() - s.log2_mignitude(), -195);
    EXPECT_TRUE(overlap(cosine_of_degrees(degrees + 720, 200), c));
    EXPECT_TRUE(overlap(cosine_of_degrees(2 * degrees, 200), square(c) * 2L - Interval(1L, 200)));
  });
}

TEST(Angles, AreRationalTogetherAtThirtyDegreesButNotApart) {
  EXPECT_TRUE(are_rational({30, 60}));
  EXPECT_FALSE(are_rational({30, 45}));
  EXPECT_TRUE(are_rational({0, 30}));
  const AngleFactors<Rational> factors = angle_factors(EndAngles{30, 30}, Field<Rational>{});
  EXPECT_EQ(factors.cos_2left, Rational(1, 2));
  EXPECT_EQ(factors.sin_2left_sin_2right, Rational(3, 4));
}

TEST(Angles, OnlyTheirDifferenceCountsWithoutStations) {
  const model::Chain direct = test::alike_chain(0, "1/10", "1/2", "1/2", "0");
  const EndAngles angles = effective_angles(direct, {Rational("1/3"), Rational("136/3")});
  EXPECT_EQ(angles.left_deg, 0);
  EXPECT_EQ(angles.right_deg, 45);
  const model::Chain swapped = test::alike_chain(1, "1/10", "1/2", "1/2", "0");
  EXPECT_EQ(effective_angles(swapped, {7, 9}).left_deg, 7);
}

}  // namespace
}  // namespace heraldgauge::reference
