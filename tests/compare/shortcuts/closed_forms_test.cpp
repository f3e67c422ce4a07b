// Printed closed forms against the numbers they are known by, and products over stations.

#include "reference/arithmetic/interval.hpp"
#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;
using model::Real;

// mu = 1/20, efficiencies 0.145 and 0.0145, background probability Y0 = 6.02e-6 an end, so d = 1 - sqrt(1-Y0).
Case published_link() {
  Case link = case_of(test::alike_chain(0, "1/21", "1/1", "1/1", "0/1"));
  const Real dark = Real(1) - Real::square_root(Real(1) - Real(Rational(301, 50000000)));
  for (model::Detector& detector : link.chain.left_end.detectors) detector = {Rational(29, 200), dark};
  for (model::Detector& detector : link.chain.right_end.detectors) detector = {Rational(29, 2000), dark};
  return link;
}

// The printed error rate is 0.0542973048276305801 with a misalignment of 1.5 %, the model's 0.0542999879578555178
// (computed from the formula of Ma, Fung and Lo 2007, from memory); a bit flip enters as E(e) = 1/2 - (1-2e)(1/2 -
// E(0)).
double without_misalignment(double error) { return 0.5 - (0.5 - error) / (1 - 2 * 0.015); }

TEST(ErrorGainWithoutDarkFactor, IsThePrintedNumber) {
  expect_near(enclosure_by("error-gain-without-dark-factor", published_link(), "qber_rectilinear"),
              without_misalignment(0.0542973048276305801), 1e-14);
  const auto error = error_of("error-gain-without-dark-factor", published_link(), "qber_rectilinear");
  ASSERT_TRUE(error.exact);
  expect_near(*error.exact, without_misalignment(0.0542999879578555178), 1e-14);
  EXPECT_EQ(error.bias, Bias::optimistic);
}

TEST(ErrorGainWithoutDarkFactor, IsExactWithoutDarkCounts) {
  const Case quiet = case_of(test::alike_chain(0, "1/21", "1/1", "1/5", "0/1"));
  EXPECT_TRUE(
      error_of("error-gain-without-dark-factor", quiet, "qber_diagonal").certainly_within(Rational(1, 10000000000)));
}

// V = (1+mu)/(1+3 mu) at vanishing efficiency, so (1-V)/2 = mu/(1+3 mu).
TEST(ErrorFromVisibility, IsHalfTheDeficit) {
  const Case dim = case_of(test::alike_chain(0, "1/21", "1/1000", "1/1000", "0/1"));
  expect_near(enclosure_by("error-from-visibility", dim, "qber_rectilinear"), 0.05 / 1.15, 1e-4);
  expect_near(enclosure_by("error-from-visibility", dim, "qber_diagonal"), 0.05 / 1.15, 1e-4);
}

// mu = 0.05: 0.900 where all orders at vanishing efficiency give 1.05/1.15.
TEST(FirstOrderVisibility, IsOneMinusTwoMu) {
  const Case dim = case_of(test::alike_chain(0, "1/21", "1/1000", "1/1000", "0/1"));
  expect_encloses(enclosure_by("first-order-visibility", dim, "visibility"), Rational(9, 10));
  const auto error = error_of("first-order-visibility", dim, "visibility");
  EXPECT_NEAR(error.relative->get_d(), 0.9 * 1.15 / 1.05 - 1, 1e-5);
  EXPECT_EQ(error.bias, Bias::pessimistic);
}

TEST(FirstOrderVisibility, IsOneMinusEightMuAtAStation) {
  const Case one = case_of(test::alike_chain(1, "1/21", "1/1000", "1/1000", "0/1"));
  expect_encloses(enclosure_by("first-order-visibility", one, "visibility"), Rational(3, 5));
  EXPECT_NEAR(error_of("first-order-visibility", one, "visibility").exact->lower.get_d(), 0.7147, 1e-3);
}

TEST(LowEfficiencyVisibility, HoldsAtLowEfficiency) {
  expect_near(enclosure_by("low-efficiency-visibility", published_link(), "visibility"), 0.91304, 1e-5);
  for (const std::size_t stations : {0U, 1U}) {
    const Case dim = case_of(test::alike_chain(stations, "1/21", "1/1000", "1/1000", "0/1"));
    EXPECT_TRUE(error_of("low-efficiency-visibility", dim, "visibility").certainly_within(Rational(1, 100000)));
  }
  const Case bright = case_of(test::alike_chain(1, "1/21", "1/1", "1/1", "0/1"));
  EXPECT_TRUE(error_of("low-efficiency-visibility", bright, "visibility").certainly_beyond(Rational(1, 100)));
}

// -log2(1 - 0.01) = 0.0144995696951151, and twice the slope for the looser bound, 0.0288548626721851.
TEST(LinearCapacity, IsAPrefactor) {
  Case link = case_of(test::alike_chain(0, "1/5", "1/10", "1/1", "0/1"));
  expect_encloses(enclosure_by("linear-capacity", link, "capacity_point"), Rational(9, 625));
  EXPECT_NEAR(error_of("linear-capacity", link, "capacity_point").relative->get_d(), 0.0144 / 0.0144995696951151 - 1,
              1e-12);
  EXPECT_NEAR(error_of("linear-capacity", link, "capacity_loose").relative->get_d(), 0.0288 / 0.0288548626721851 - 1,
              1e-12);
  expect_encloses(enclosure_by("linear-capacity", link, "capacity_arm"), Rational(18, 125));
}

TEST(VisibilityProduct, IsExactAtOneStationAndASquareAtTwo) {
  const Case one = case_of(test::alike_chain(1, "1/101", "1/1000", "1/1000", "0/1"));
  EXPECT_TRUE(error_of("visibility-product", one, "visibility").certainly_within(Rational(1, 1000000000000)));
  const double mu = 0.01, single = (1 + mu) * (1 + mu) / (1 + 10 * mu + 17 * mu * mu);
  const Case two = case_of(test::alike_chain(2, "1/101", "1/1000", "1/1000", "0/1"));
  expect_near(enclosure_by("visibility-product", two, "visibility"), single * single, 1e-4);
  EXPECT_TRUE(error_of("visibility-product", two, "visibility").certainly_beyond(Rational(1, 1000)));
}

// Without pairs the stations are independent, each 2 d^2 (1-d)^2.
TEST(HeraldProduct, HoldsForDarkCountsAlone) {
  const Case dark = case_of(test::alike_chain(2, "0/1", "1/1", "1/1", "1/100"));
  const Rational station = Rational(2 * 99 * 99) / 100000000;
  expect_encloses(enclosure_by("herald-product", dark, "herald_probability"), station * station);
  EXPECT_TRUE(error_of("herald-product", dark, "herald_probability").certainly_within(Rational(1, 100000000000)));
  const Case bright = case_of(test::alike_chain(2, "1/100", "1/2", "1/2", "0/1"));
  EXPECT_TRUE(error_of("herald-product", bright, "herald_probability").certainly_beyond(Rational(1, 10)));
}

}  // namespace
}  // namespace heraldgauge::compare
