#include "reference/pair_number/dark_weights.hpp"

#include <gtest/gtest.h>

namespace heraldgauge::reference::pair_number {
namespace {

using model::Ask;
using model::Rational;

constexpr Precision bits = 128;
const Ask silent{Ask::Kind::silent};
const Ask clicks{Ask::Kind::clicks};

model::Detector detector(const Rational& efficiency, const Rational& dark) { return {efficiency, dark}; }

TEST(DarkWeights, SplitAClickBetweenPhotonAndDarkEvent) {
  const auto weights =
      dark_weights({{detector({1, 2}, {1, 10}), detector({1, 3}, {1, 5})}, {clicks, silent}, {}, 2}, bits);
  ASSERT_EQ(weights.size(), 2u);
  EXPECT_EQ(weights[0].orders, (std::vector<long>{0, 0}));
  EXPECT_TRUE(weights[0].weight.contains(Rational(8, 100)));
  EXPECT_EQ(weights[1].total_order(), 1);
  EXPECT_TRUE(weights[1].weight.contains(Rational(8, 10)));
}

TEST(DarkWeights, CountDarkEventsAsPoisson) {
  const Rational dark(1, 10);
  const auto weights = dark_weights({{detector({1, 2}, dark)}, {{Ask::Kind::counts, 2}}, {}, 2}, bits);
  ASSERT_EQ(weights.size(), 3u);
  const Interval mean = -logarithm(Interval(Rational(9, 10), bits));
  EXPECT_TRUE(overlap(weights[0].weight, square(mean) * Interval(Rational(9, 20), bits)));
  EXPECT_TRUE(overlap(weights[1].weight, mean * Interval(Rational(9, 10), bits)));
  EXPECT_TRUE(weights[2].weight.contains(Rational(9, 10)));
}

TEST(DarkWeights, LetABackgroundFireDetectorsTogether) {
  // Two modes, 3 photons in all, two detectors: g(S) = prod (1-d) (1 + 3 sum eta/4)^-2.
  const DetectorGroup group{{detector({1, 2}, {1, 10}), detector({1, 3}, 0)}, {clicks, clicks}, {Rational(3), 2}, 2};
  const Rational first = Rational(9, 10) / (Rational(11, 8) * Rational(11, 8));
  const Rational second = 1 / (Rational(5, 4) * Rational(5, 4));
  const Rational both = Rational(9, 10) / (Rational(13, 8) * Rational(13, 8));
  const auto weights = dark_weights(group, bits);
  ASSERT_EQ(weights.size(), 4u);
  EXPECT_TRUE(weights[0].weight.contains(1 - first - second + both));
  EXPECT_TRUE(weights[1].weight.contains(1 - first));
  EXPECT_TRUE(weights[2].weight.contains(1 - second));
  EXPECT_TRUE(weights[3].weight.contains(1));
}

TEST(DarkWeights, KeepTheirBitsUnderAFaintBackground) {
  const Rational faint("1/1000000000000000000000000000000000000000000000000000000000000");
  const auto weights =
      dark_weights({{detector({1, 2}, 0), detector({1, 3}, 0)}, {clicks, clicks}, {faint, 1}, 2}, bits);
  EXPECT_TRUE(weights[0].weight.is_certainly_positive());
  EXPECT_LT(weights[0].weight.log2_width(), weights[0].weight.log2_mignitude() - 120);
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
