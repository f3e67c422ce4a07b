// Sampling against certified values: coverage of its intervals, stopping, and what it says of its own cost.

#include "compare/ledger_records.hpp"
#include "compare/sampling/metropolis.hpp"
#include "compare/sampling/sample.hpp"
#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;
using reference::Basis;

model::Chain bright_chain(std::size_t stations) { return test::alike_chain(stations, "1/5", "9/10", "9/10", "1/1000"); }

double certified(const model::Chain& chain, const std::string& quantity) {
  reference::Request request;
  request.quantities = {quantity_named(quantity)};
  return reference::enclose(chain, request)->front().enclosure->lower.get_d();
}

// 400 intervals of 95 %: the number that cover lies within 367 and 393 with probability above 0.999 (binomial, 380
// +- 4.36).
TEST(ShotSampling, IntervalsCoverTheCertifiedValue) {
  const double exact = certified(bright_chain(1), "herald_probability");
  TrialModel trials(bright_chain(1));
  const int runs = 400;
  int covered = 0;
  for (int run = 0; run < runs; ++run) {
    const Counts counts = sampled(trials, {}, {4000, 0}, 1000 + static_cast<std::uint64_t>(run));
    const ConfidenceInterval interval = wilson_interval(counts.heralds, counts.trials);
    if (interval.lower <= exact && exact <= interval.upper) ++covered;
  }
  EXPECT_GE(covered, 0.917 * runs);
  EXPECT_LE(covered, 0.983 * runs);
}

TEST(ShotSampling, EndsAreDrawnByTheirConditionalProbabilities) {
  TrialModel trials(bright_chain(1));
  const Counts counts = sampled(trials, {Basis::rectilinear, Basis::diagonal}, {300000, 0}, 7);
  ASSERT_GT(counts.heralds, 10000U);
  for (const auto& [basis, name] :
       {std::pair{Basis::rectilinear, "qber_rectilinear"}, std::pair{Basis::diagonal, "qber_diagonal"}}) {
    const auto& table = counts.ends.at(basis);
    std::uint64_t both = 0, twice_wrong = 0;
    for (std::size_t l = 1; l < 4; ++l) {
      for (std::size_t r = 1; r < 4; ++r) {
        both += table[l][r];
        const bool agree_expected = basis == Basis::diagonal;
        twice_wrong += l == 3 || r == 3 ? table[l][r] : (l == r) != agree_expected ? 2 * table[l][r] : 0;
      }
    }
    const double exact = certified(bright_chain(1), name);
    const double error = std::sqrt(exact * (1 - exact) / static_cast<double>(both));
    EXPECT_NEAR(static_cast<double>(twice_wrong) / 2 / static_cast<double>(both), exact, 4 * error) << name;
  }
}

TEST(ShotSampling, SameSeedSameSample) {
  TrialModel first(bright_chain(1)), second(bright_chain(1));
  EXPECT_EQ(sampled(first, {}, {5000, 0}, 3).heralds, sampled(second, {}, {5000, 0}, 3).heralds);
  EXPECT_NE(sampled(first, {}, {5000, 0}, 3).heralds, sampled(second, {}, {5000, 0}, 4).heralds);
}

TEST(ShotSampling, DoesNotDependOnWhatElseIsCounted) {
  TrialModel trials(bright_chain(1));
  const Counts both = sampled(trials, {Basis::rectilinear, Basis::diagonal}, {10000, 0}, 7);
  const Counts one = sampled(trials, {Basis::diagonal}, {10000, 0}, 7);
  EXPECT_EQ(both.heralds, one.heralds);
  EXPECT_EQ(both.ends.at(Basis::diagonal), one.ends.at(Basis::diagonal));
}

TEST(SamplingToError, StopsAtOnePercent) {
  EXPECT_EQ(heralds_for(0.01), 10000U);
  TrialModel trials(bright_chain(1));
  const Counts counts = sampled(trials, {}, {100000000, heralds_for(0.01)}, 11);
  EXPECT_EQ(counts.heralds, 10000U);
  const double exact = certified(bright_chain(1), "herald_probability");
  EXPECT_NEAR(10000.0 / static_cast<double>(counts.trials), exact, 4 * 0.01 * exact);
}

TEST(SamplingToError, SaysWhatTheCertifiedRouteCostsAtThreeStations) {
  const Case point = case_of(bright_chain(3));
  const Departure& departure = departure_named("shot-sampling-to-error");
  const Chosen chosen{&departure, Rational(1, 10)};
  const ProcessorClock clock;
  const auto errors = errors_of(point, chosen, {{quantity_named("herald_probability")}, 15});
  ASSERT_TRUE(errors);
  EXPECT_NE(errors->front().effort.find("trials"), std::string::npos);
  EXPECT_TRUE(errors->front().certainly_within(Rational(1, 2)));
  const auto cost = cost_of_sample(point, chosen, *errors, clock.seconds());
  ASSERT_TRUE(cost);
  EXPECT_GT(std::stod(cost->seconds), 0);
  EXPECT_GT(std::stod(cost->certified_seconds), 0);
}

// 400 000 steps of a walk with a correlation time of tens of steps: half a percent.
TEST(Metropolis, ConvergesToTheConditionalValues) {
  const Case point = case_of(bright_chain(1));
  for (const char* name : {"gain", "qber_rectilinear"}) {
    const auto error = error_of("metropolis-pair-numbers", point, name, Rational(400000));
    ASSERT_TRUE(error.relative) << error.reason;
    EXPECT_LT(std::abs(error.relative->get_d()), 0.01) << name;
  }
  const auto values =
      departure_named("metropolis-pair-numbers").evaluate(point, {quantity_named("herald_probability")}, Rational(10));
  EXPECT_EQ(values.front().status, fast::Status::declined);
}

}  // namespace
}  // namespace heraldgauge::compare
