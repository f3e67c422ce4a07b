// The ring form against the plain determinant, which shares neither matrices nor subsets with it.

#include <gtest/gtest.h>

#include "reference/determinant/joint.hpp"
#include "reference/determinant/plain_determinant.hpp"
#include "reference/determinant/route.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Ask;
using model::Chain;
using model::Pattern;
using test::Random;

// The herald's accepted strings as patterns that also ask exact clicks of the ends.
std::vector<Pattern> herald_patterns(const Chain& chain, std::size_t left, std::size_t right) {
  const auto asked = [](std::size_t clicks, std::size_t bit) {
    return Ask{(clicks & bit) != 0 ? Ask::Kind::clicks : Ask::Kind::silent};
  };
  Pattern empty;
  empty.left = {asked(left, 2), asked(left, 1)};
  empty.right = {asked(right, 2), asked(right, 1)};
  std::vector<Pattern> patterns = {empty};
  for (const model::Station& station : chain.stations) {
    std::vector<Pattern> longer;
    for (const Pattern& pattern : patterns) {
      for (const model::AcceptedOutcome& outcome : model::accepted_outcomes(station.herald)) {
        longer.push_back(pattern);
        longer.back().stations.push_back(outcome.detectors);
      }
    }
    patterns = longer;
  }
  return patterns;
}

TEST(Ring, OverlapsThePlainDeterminantOnRandomPatterns) {
  test::for_each_case(60, 20261, [](Random& random) {
    const Chain chain = test::random_chain(random, {.largest_station_count = 2});
    const Pattern pattern = test::random_pattern(random, chain.station_count());
    const Interval ring = pattern_probability(Field<Interval>{220}, chain, pattern);
    const Interval plain = plain_pattern_probability(chain, pattern, 260);
    EXPECT_TRUE(overlap(ring, plain)) << test::describe_chain(chain);
    EXPECT_LT(ring.log2_width(), -190) << test::describe_chain(chain);
    EXPECT_LT(plain.log2_width(), -190) << test::describe_chain(chain);
  });
}

TEST(Ring, OverlapsThePlainDeterminantWithSharedBackground) {
  test::for_each_case(10, 20262, [](Random& random) {
    Chain chain = test::random_chain(random, {.smallest_station_count = 1, .largest_station_count = 1});
    chain.stations[0].background = {model::Rational(1, 50), 3};
    chain.left_end.background = {model::Rational(1, 20), 1};
    const Pattern pattern = test::random_pattern(random, chain.station_count());
    EXPECT_TRUE(overlap(pattern_probability(Field<Interval>{220}, chain, pattern),
                        plain_pattern_probability(chain, pattern, 220)));
  });
}

TEST(JointTable, SumsTheAcceptedStringsWithTheRightEndTurnedAfterAnOddNumberOfPsiMinus) {
  test::for_each_case(6, 20263, [](Random& random) {
    const Chain chain = test::random_chain(random, {.smallest_station_count = 1, .largest_station_count = 2});
    const EndTable<Interval> table = joint_table(Field<Interval>{220}, chain, Basis::analyser);
    for (std::size_t left = 0; left < 4; ++left) {
      const std::size_t right = (left + random() % 4) % 4;
      Interval expected(220);
      for (const Pattern& pattern : herald_patterns(chain, left, right)) {
        bool odd = false;
        for (const auto& station : pattern.stations) {
          for (const auto& outcome : model::accepted_outcomes(model::Herald::psi_minus)) {
            if (outcome.detectors == station) odd = !odd;
          }
        }
        Chain corrected = chain;
        if (odd) corrected.right_end.analyser_deg = -chain.right_end.analyser_deg;
        expected += plain_pattern_probability(corrected, pattern, 220);
      }
      EXPECT_TRUE(overlap(table.joint[left][right], expected)) << left << right << test::describe_chain(chain);
    }
  });
}

TEST(JointTable, DiagonalBasisExchangesTheRecordedBitsAfterAnOddNumberOfPsiMinus) {
  test::for_each_case(6, 20264, [](Random& random) {
    Chain chain = test::random_chain(random, {.smallest_station_count = 1, .largest_station_count = 1});
    chain.stations[0].herald = model::Herald::either;
    chain.left_end.analyser_deg = chain.right_end.analyser_deg = 45;
    const EndTable<Interval> table = joint_table(Field<Interval>{220}, chain, Basis::diagonal);
    for (const auto& [right, exchanged] : {std::pair<std::size_t, std::size_t>{1, 2}, {2, 1}, {3, 3}, {0, 0}}) {
      Interval expected(220);
      for (const Pattern& pattern : herald_patterns(chain, 2, right)) {
        Pattern recorded = pattern;
        const bool minus = pattern.stations[0][model::cH].kind != pattern.stations[0][model::cV].kind;
        if (minus) recorded.right = herald_patterns(chain, 2, exchanged).front().right;
        expected += plain_pattern_probability(chain, recorded, 220);
      }
      EXPECT_TRUE(overlap(table.joint[2][right], expected)) << right << test::describe_chain(chain);
    }
  });
}

TEST(JointTable, IntervalsContainTheExactRationals) {
  test::for_each_case(20, 20265, [](Random& random) {
    const Chain chain = test::random_chain(random, {.largest_station_count = 1, .free_angles = false});
    const EndTable<Rational> exact = joint_table(Field<Rational>{}, chain, Basis::diagonal);
    const EndTable<Interval> enclosed = joint_table(Field<Interval>{160}, chain, Basis::diagonal);
    Rational sum = 0;
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) {
        EXPECT_TRUE(enclosed.joint[l][r].contains(exact.joint[l][r]));
        EXPECT_GE(exact.joint[l][r], 0);
        sum += exact.joint[l][r];
      }
    }
    EXPECT_EQ(sum, herald_probability(Field<Rational>{}, chain)) << "the 16 end patterns share out the herald";
  });
}

TEST(DeterminantTerms, CountsFourAStationWithAlikeDetectorsAndMoreOtherwise) {
  Chain chain = test::alike_chain(3, "1/100", "1/10", "1/2", "1/1000000");
  EXPECT_EQ(determinant_terms(chain), 64);
  for (model::Station& station : chain.stations) station.herald = model::Herald::either;
  EXPECT_EQ(determinant_terms(chain), 64) << "psi- merges with psi+ after the correction";
  chain.stations[0].detectors[model::cH].efficiency = model::Rational(1, 3);
  EXPECT_GT(determinant_terms(chain), 64);
}

TEST(DeterminantRefusal, NamesWhatItCannotServe) {
  Chain chain = test::alike_chain(1, "1/100", "1/10", "1/2", "0");
  EXPECT_FALSE(determinant_refusal(chain));
  chain.stations[0].detectors[model::dV].kind = model::DetectorKind::resolving;
  EXPECT_EQ(determinant_refusal(chain), "a number-resolving detector (station 1)");
  chain.sources[1].kind = model::SourceKind::ideal_pair;
  EXPECT_EQ(determinant_refusal(chain), "an ideal-pair source (source 1)");
}

TEST(PlainDeterminant, IsUnboundedWhereNoPivotExcludesZero) {
  const Interval zero(64), one(1L, 64);
  EXPECT_TRUE(determinant({{one, one}, {one, zero}}, 64).contains(-1));
  EXPECT_FALSE(determinant({{zero, one}, {zero, one}}, 64).is_bounded());
}

}  // namespace
}  // namespace heraldgauge::reference
