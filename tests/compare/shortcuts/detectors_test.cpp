// Shortcuts about detectors, on one source where H and V are independent: h photons of H with probability lam^h
// (1-lam), the same number at both ends, so P(1010) = (1-lam)^2 [sum lam^h c(h)^2] [sum lam^v s(v)^2], c and s the
// click and silence probabilities.

#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

const Rational lam(1, 5), d(1, 100);

Case perfect(const std::string& dark) { return case_of(test::alike_chain(0, "1/5", "1/1", "1/1", dark)); }

// eta = 1/2: silence is 1, 1/2, 0, 0, ... for 0, 1, 2, ... photons, so sum lam^h s = 1 + lam/2, sum lam^h s^2 = 1 +
// lam/4.
TEST(LinearLoss, ReachesOneAtTwoPhotons) {
  const Case half = case_of(test::alike_chain(0, "1/5", "1/1", "1/2", "0/1"));
  const Rational single = (1 - lam) * (1 + lam / 2), both = (1 - lam) * (1 + lam / 4);
  expect_encloses(enclosure_by("linear-loss", half, "gain"), 1 - 2 * single * single + both * both);
}

TEST(LinearLoss, IsGoodForPoorDetectors) {
  const Case poor = case_of(test::alike_chain(0, "1/100", "1/1", "1/1000", "0/1"));
  EXPECT_TRUE(error_of("linear-loss", poor, "gain").certainly_within(Rational(1, 1000)));
  EXPECT_EQ(error_of("linear-loss", poor, "gain").bias, Bias::optimistic);
}

// Exactly one photon: lam (1-lam)^2 in place of lam (1-lam), an error of -lam.
TEST(ResolvingDetectors, SeeExactlyOnePhoton) {
  expect_encloses(enclosure_by("resolving-detectors", perfect("0/1"), "end_pattern_1010"), lam * (1 - lam) * (1 - lam));
  const auto error = error_of("resolving-detectors", perfect("0/1"), "end_pattern_1010");
  ASSERT_TRUE(error.certified);
  expect_encloses(*error.certified, -lam);
}

// The exact value is (1-lam)^2 [d^2 + lam/(1-lam)] (1-d)^2; to first order in d, lam (1-lam) (1 - 2 d).
TEST(LinearDark, IsTheFirstOrder) {
  expect_encloses(enclosure_by("linear-dark", perfect("1/100"), "end_pattern_1010"), lam * (1 - lam) * (1 - 2 * d));
}

// Without any pair a herald needs two dark events: nothing is left of it to first order.
TEST(LinearDark, LosesTheDoubleDarkHerald) {
  const Case dark = case_of(test::alike_chain(1, "0/1", "1/1", "1/1", "1/100"));
  const auto error = error_of("linear-dark", dark, "herald_probability");
  ASSERT_TRUE(error.certified);
  EXPECT_LE(error.certified->upper, Rational(-999999, 1000000));
}

TEST(NoDoubleDark, LosesTheDoubleDarkHeraldOnly) {
  const Case dark = case_of(test::alike_chain(1, "0/1", "1/1", "1/1", "1/100"));
  const auto nothing = enclosure_by("no-double-dark", dark, "herald_probability");
  EXPECT_LE(nothing.lower, 0);
  EXPECT_LT(nothing.upper, Rational(1, 1000000000000000000));
  const Case bright = case_of(test::alike_chain(1, "1/100", "1/2", "1/2", "1/1000000"));
  EXPECT_TRUE(error_of("no-double-dark", bright, "herald_probability").certainly_within(Rational(1, 1000000)));
  EXPECT_EQ(error_of("no-double-dark", bright, "herald_probability").bias, Bias::pessimistic);
}

// c(0) = d, c(h) = 1 + d; s(0) = 1 - d, s(v) = -d.
TEST(DarkOverlapDropped, AddsClicks) {
  const Rational more = lam / (1 - lam);
  const Rational clicks = d * d + (1 + d) * (1 + d) * more, silence = (1 - d) * (1 - d) + d * d * more;
  expect_encloses(enclosure_by("dark-overlap-dropped", perfect("1/100"), "end_pattern_1010"),
                  (1 - lam) * (1 - lam) * clicks * silence);
}

// N = 0, alike detectors: the published gain of a pair source (Ma, Fung, Lo 2007, equal to the model), with mu =
// lam/(1-lam).
Rational published_gain(const Rational& eta, const Rational& dark) {
  const Rational mu = lam / (1 - lam), quiet = (1 - dark) * (1 - dark);
  const Rational single = 1 + eta * mu, both = 1 + (2 * eta - eta * eta) * mu;
  return 1 - 2 * quiet / (single * single) + quiet * quiet / (both * both);
}

TEST(DarkModelSwap, LowersTheEfficiencyByOneMinusD) {
  const Case half = case_of(test::alike_chain(0, "1/5", "1/1", "1/2", "1/100"));
  expect_encloses(enclosure_by("dark-model-swap", half, "gain"), published_gain(Rational(1, 2) * (1 - d), d));
  Case thermal = half;
  thermal.chain = departure_named("dark-model-swap").transform(half)->chain;
  expect_encloses(enclosure_by("dark-model-swap", thermal, "gain"), published_gain(Rational(1, 2), d));
}

TEST(LumpedArms, TakesTheGeometricMean) {
  Case uneven = case_of(test::alike_chain(0, "1/5", "1/1", "1/1", "1/100"));
  uneven.chain.left_arms[0].transmittance = Rational(1, 4);
  expect_encloses(enclosure_by("lumped-arms", uneven, "gain"), published_gain(Rational(1, 2), d));
  EXPECT_EQ(error_of("lumped-arms", perfect("1/100"), "gain").bias, Bias::exact);
}

}  // namespace
}  // namespace heraldgauge::compare
