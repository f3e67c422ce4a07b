// Extremes of angular profiles: known ones, a second method, and tightness.

#include "reference/extremes.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "reference/determinant/joint.hpp"
#include "reference/determinant/profile.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Rational;
using test::Random;

constexpr Precision bits = 160;

AngularProfile profile_of(const std::vector<Rational>& cosine, const std::vector<Rational>& sine) {
  AngularProfile profile{{}, {}, {Interval(bits), Interval(bits), Interval(bits)}, Interval(bits), {}};
  for (const Rational& x : cosine) profile.cosine.emplace_back(x, bits);
  for (const Rational& x : sine) profile.sine.emplace_back(x, bits);
  return profile;
}

double evaluate(const std::vector<Rational>& cosine, const std::vector<Rational>& sine, double phi) {
  double sum = 0;
  for (std::size_t q = 1; q < cosine.size(); ++q) {
    const double angle = static_cast<double>(q) * phi;
    sum += cosine[q].get_d() * std::cos(angle) + sine[q].get_d() * std::sin(angle);
  }
  return sum;
}

TEST(Extremes, OfOneHarmonicAreItsModulus) {
  const Extremes extremes = extremes_of(profile_of({7, 3}, {0, 4}));
  EXPECT_TRUE(extremes.largest.contains(5));
  EXPECT_TRUE(extremes.smallest.contains(-5));
  EXPECT_TRUE(extremes.mean.contains(7));
  EXPECT_LT(extremes.largest.log2_width(), -140);
  EXPECT_LT(extremes.smallest.log2_width(), -140);
}

TEST(Extremes, FindTheHigherOfTwoLocalMaxima) {
  // cos phi / 10 + cos 2 phi: 11/10 at 0, 9/10 at pi; the minimum where cos phi = -1/40: -1 - 1/800.
  const Extremes extremes = extremes_of(profile_of({0, Rational(1, 10), 1}, {0, 0, 0}));
  EXPECT_TRUE(extremes.largest.contains(Rational(11, 10)));
  EXPECT_TRUE(extremes.smallest.contains(Rational(-801, 800)));
  EXPECT_LT(extremes.largest.log2_width(), -140);
  EXPECT_LT(extremes.smallest.log2_width(), -140);
}

TEST(Extremes, OfEqualMaximaStayTight) {
  const Extremes extremes = extremes_of(profile_of({0, 0, 0, 2}, {0, 0, 0, 0}));
  EXPECT_TRUE(extremes.largest.contains(2));
  EXPECT_LT(extremes.largest.log2_width(), -140);
}

TEST(Extremes, OfAFlatProfileAreExactlyZero) {
  const Extremes extremes = extremes_of(profile_of({3, 0, 0}, {0, 0, 0}));
  EXPECT_TRUE(extremes.largest.is_exactly_zero());
  EXPECT_TRUE(extremes.smallest.is_exactly_zero());
}

TEST(Extremes, RefuseHarmonicsThatThePrecisionDoesNotResolve) {
  AngularProfile profile = profile_of({1, 0}, {0, 0});
  profile.cosine[1] = Interval(Rational(-1, 1000), Rational(1, 1000), bits);
  EXPECT_FALSE(extremes_of(profile).largest.is_bounded());
}

TEST(Extremes, IncludeTheRemainder) {
  AngularProfile profile = profile_of({0, 1}, {0, 0});
  profile.remainder[0] = Interval(Rational(1, 1000), bits);
  profile.remainder[1] = Interval(Rational(1, 1000), bits);
  profile.remainder[2] = Interval(Rational(1, 1000), bits);
  const Extremes extremes = extremes_of(profile);
  EXPECT_TRUE(extremes.largest.contains(Rational(1001, 1000)));
  EXPECT_TRUE(extremes.largest.contains(Rational(999, 1000)));
  EXPECT_LT(extremes.largest.upper(), Rational(1003, 1000));
}

TEST(Extremes, BoundRandomProfilesAsDenseSamplingDoes) {
  test::for_each_case(60, 40261, [](Random& random) {
    std::vector<Rational> cosine, sine;
    for (int q = 0; q < 6; ++q) {
      const double size = std::exp2(-q * test::uniform(random, 0, 2));
      cosine.emplace_back(test::uniform(random, -size, size));
      sine.emplace_back(test::uniform(random, -size, size));
    }
    const Extremes extremes = extremes_of(profile_of(cosine, sine));
    double largest = -1e9, smallest = 1e9;
    constexpr int samples = 20000;
    for (int i = 0; i < samples; ++i) {
      const double value = evaluate(cosine, sine, 2 * M_PI * i / samples);
      largest = std::max(largest, value);
      smallest = std::min(smallest, value);
    }
    // Sampling misses an extreme by at most max|h''| (pi/samples)^2 / 2, and |h''| <= sum q^2 (|a| + |b|) < 110.
    const double missed = 110 * (M_PI / samples) * (M_PI / samples);
    EXPECT_GE(extremes.largest.upper().get_d(), largest - 1e-12);
    EXPECT_LE(extremes.largest.lower().get_d(), largest + missed + 1e-12);
    EXPECT_LE(extremes.smallest.lower().get_d(), smallest + 1e-12);
    EXPECT_GE(extremes.smallest.upper().get_d(), smallest - missed - 1e-12);
    EXPECT_LT(extremes.largest.log2_width(), -120);
    EXPECT_LT(extremes.smallest.log2_width(), -120);
  });
}

TEST(DeterminantProfile, GivesTheCoincidenceAtEveryAngle) {
  test::for_each_case(12, 40262, [](Random& random) {
    model::Chain chain = test::random_chain(random, {.smallest_station_count = 1, .largest_station_count = 2});
    const AngularProfile profile = determinant_profile(chain, bits);
    const Rational right = Rational(std::round(test::uniform(random, -90, 90) * 16) / 16);
    chain.right_end.analyser_deg = right;
    const EndTable<Interval> table = joint_table(Field<Interval>{bits}, chain, Basis::analyser);
    const Interval phi = Interval(Rational(right / 90), bits) * pi(bits);
    Interval sum = profile.cosine[0];
    for (std::size_t q = 1; q < profile.cosine.size(); ++q) {
      const Interval angle = phi * static_cast<long>(q);
      sum += profile.cosine[q] * cosine(angle) + profile.sine[q] * sine(angle);
    }
    sum += hull(profile.remainder[0], -profile.remainder[0]);
    EXPECT_TRUE(overlap(sum, table.joint[2][2])) << test::describe_chain(chain);
    EXPECT_LT(sum.log2_width(), -135);
  });
}

}  // namespace
}  // namespace heraldgauge::reference
