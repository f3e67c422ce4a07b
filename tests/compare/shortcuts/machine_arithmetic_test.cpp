// Exact formulas in machine arithmetic: the errors that they are known to have.

#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

// lam = 0.01, d = 1e-7, efficiency 0.01: measured relative errors of 1e-10, 1e-3 and 1e4 for no, one and two stations.
TEST(SubsetSumBinary64, LosesAllDigitsAtTwoStations) {
  const auto error = [](std::size_t stations) {
    const Case point = case_of(test::alike_chain(stations, "1/100", "1/1", "1/100", "1/10000000"));
    return error_of("subset-sum-binary64", point, "end_pattern_1010");
  };
  EXPECT_TRUE(error(0).certainly_within(Rational(1, 100000000)));
  EXPECT_TRUE(error(1).certainly_within(Rational(1, 2)));
  EXPECT_TRUE(error(2).certainly_beyond(Rational(1)));
  EXPECT_EQ(error(2).digits_left, 0);
}

TEST(SubsetSumBinary64, KeepsItsDigitsForCommonEvents) {
  const Case point = case_of(test::alike_chain(1, "1/5", "9/10", "9/10", "1/1000"));
  EXPECT_TRUE(
      error_of("subset-sum-binary64", point, "herald_probability").certainly_within(Rational(1, 1000000000000)));
}

// Where binary64 keeps its digits, binary32 loses about nine of them.
TEST(SubsetSumBinary32, IsWorse) {
  const Case point = case_of(test::alike_chain(1, "1/5", "9/10", "9/10", "1/1000"));
  const auto error = error_of("subset-sum-binary32", point, "herald_probability");
  EXPECT_TRUE(error.certainly_within(Rational(1, 1000)));
  EXPECT_TRUE(error.certainly_beyond(Rational(1, 1000000000)));
}

// Half a unit of binary32 is 6e-8; a chain of a few hundred additions of positive terms stays below 1e-5.
TEST(PairChainBinary32, HasTheDigitsOfBinary32) {
  const Case point = case_of(test::alike_chain(1, "1/100", "1/2", "1/2", "1/100000"));
  const auto error = error_of("pair-chain-binary32", point, "herald_probability", Rational(8));
  EXPECT_TRUE(error.certainly_within(Rational(1, 100000)));
  EXPECT_TRUE(error.certainly_beyond(Rational(1, 10000000000)));
}

}  // namespace
}  // namespace heraldgauge::compare
