// Angles, counting variables and source weights.
#include <gtest/gtest.h>

#include "reference/pair_number/angle.hpp"
#include "reference/pair_number/count_algebra.hpp"
#include "reference/pair_number/source_weights.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Rational;

constexpr Precision bits = 128;

bool is_exactly(const Interval& x, const Rational& value) { return x.lower() == value && x.upper() == value; }

TEST(SquaredDirection, IsExactWhereRational) {
  const SquaredDirection at45 = squared_direction(-315, bits);
  EXPECT_TRUE(is_exactly(at45.cosine_squared, Rational(1, 2)));
  EXPECT_TRUE(is_exactly(at45.sine_squared, Rational(1, 2)));
  EXPECT_TRUE(is_exactly(at45.product, Rational(1, 2)));
  const SquaredDirection at120 = squared_direction(120, bits);
  EXPECT_TRUE(is_exactly(at120.cosine_squared, Rational(1, 4)));
  EXPECT_TRUE(is_exactly(at120.sine_squared, Rational(3, 4)));
  const SquaredDirection at90 = squared_direction(90, bits);
  EXPECT_TRUE(at90.cosine_squared.is_exactly_zero());
  EXPECT_TRUE(at90.product.is_exactly_zero());
}

TEST(SquaredDirection, KeepsRelativePrecisionNearARightAngle) {
  const SquaredDirection direction = squared_direction(Rational("9000000001/100000000"), bits);
  EXPECT_TRUE((direction.cosine_squared + direction.sine_squared).contains(1));
  EXPECT_LT(direction.cosine_squared.log2_mignitude(), -60);
  EXPECT_LT(direction.cosine_squared.log2_width(), direction.cosine_squared.log2_mignitude() - 120);
  EXPECT_TRUE(direction.product.is_certainly_negative());
  EXPECT_TRUE(overlap(square(direction.product), direction.cosine_squared * direction.sine_squared));
}

TEST(SquaredDirection, KnowsRightAngles) {
  for (int degrees : {0, 90, -180, 270}) EXPECT_TRUE(is_right_angle_multiple(degrees)) << degrees;
  EXPECT_FALSE(is_right_angle_multiple(45));
  EXPECT_FALSE(is_right_angle_multiple(Rational("90000001/1000000")));
}

// (2 + 3 z)(5 + 7 z)
std::vector<Interval> product_of(CountVariable variable) {
  const CountAlgebra algebra({variable, {}}, 0, bits);
  std::vector<Interval> in(static_cast<std::size_t>(algebra.size()), Interval(bits)), out = in;
  in[0] = Interval(5L, bits);
  if (algebra.size() > 1) in[1] = Interval(7L, bits);
  const Polynomial factor{{{0, 0}, 0, Interval(2L, bits)}, {{1, 0}, 0, Interval(3L, bits)}};
  Interval scratch(bits);
  algebra.multiplier(factor).multiply_add(out.data(), in.data(), scratch);
  return out;
}

TEST(CountAlgebra, FollowsTheRuleOfItsVariable) {
  const auto clicks = product_of({CountVariable::Rule::idempotent, 1});
  EXPECT_TRUE(is_exactly(clicks[0], 10));
  EXPECT_TRUE(is_exactly(clicks[1], 5 * 12 - 10));  // the product at z = 1 less the one at z = 0
  const auto counts = product_of({CountVariable::Rule::truncated, 2});
  EXPECT_TRUE(is_exactly(counts[0], 10));
  EXPECT_TRUE(is_exactly(counts[1], 29));
  EXPECT_TRUE(is_exactly(counts[2], 21));
  const auto silent = product_of({});
  EXPECT_EQ(silent.size(), 1u);
  EXPECT_TRUE(is_exactly(silent[0], 10));
}

TEST(CountAlgebra, ShiftsHarmonics) {
  const CountAlgebra algebra({}, 2, bits);
  std::vector<Interval> in(5, Interval(bits)), out = in;
  in[static_cast<std::size_t>(algebra.place({0, 0}, 1))] = Interval(3L, bits);
  Interval scratch(bits);
  algebra.multiplier({{{0, 0}, 1, Interval(5L, bits)}}).multiply_add(out.data(), in.data(), scratch);
  for (long q = -2; q <= 2; ++q) {
    EXPECT_TRUE(is_exactly(out[static_cast<std::size_t>(algebra.place({0, 0}, q))], q == 2 ? 15 : 0)) << q;
  }
  EXPECT_EQ(algebra.place({0, 0}, 3), -1);
}

Interval sum_of(const std::vector<Interval>& values) {
  Interval sum(bits);
  for (const Interval& value : values) sum += value;
  return sum;
}

TEST(SourceWeights, SumToOneWithWhatLiesBeyond) {
  for (const model::Source& source : {model::Source{model::SourceKind::squeezed, Rational(3, 10)},
                                      model::Source{model::SourceKind::squeezed, Rational(0)},
                                      model::Source{model::SourceKind::ideal_pair, Rational(3, 10)}}) {
    for (long m : {1, 4}) {
      const Interval all = sum_of(pair_probabilities(source, m, bits)) + probability_beyond(source, m, bits);
      EXPECT_TRUE(all.contains(1));
      EXPECT_LT(all.log2_width(), -120);
    }
  }
}

TEST(SourceWeights, AreThoseOfTheModel) {
  const model::Source squeezed{model::SourceKind::squeezed, Rational(1, 4)};
  EXPECT_TRUE(pair_probabilities(squeezed, 2, bits)[2].contains(Rational(27, 256)));  // 3 lam^2 (1-lam)^2
  EXPECT_TRUE(state_weights(squeezed, 2, bits)[2].contains(Rational(9, 256)));
  const model::Source ideal{model::SourceKind::ideal_pair, Rational(1, 4)};
  EXPECT_TRUE(is_exactly(state_weights(ideal, 2, bits)[1], Rational(1, 8)));
  EXPECT_TRUE(state_weights(ideal, 2, bits)[2].is_exactly_zero());
  EXPECT_EQ(most_pairs(ideal), 1);
  EXPECT_EQ(most_pairs(squeezed), std::nullopt);
  EXPECT_EQ(most_pairs({model::SourceKind::ideal_pair, Rational(0)}), 0);
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
