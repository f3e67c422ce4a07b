#include "reference/pair_number/transfer.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "reference/pair_number/certified_tail.hpp"
#include "reference/pair_number/cutoffs.hpp"
#include "reference/pair_number/station_sequence.hpp"
#include "tests/reference/pair_number/kept_part.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Rational;
using test::Random;

constexpr Precision bits = 128;

Matrix random_matrix(Random& random, long rows, long columns) {
  Matrix matrix(rows, columns, bits);
  for (long row = 0; row < rows; ++row) {
    for (long column = 0; column < columns; ++column)
      matrix(row, column) = Interval(static_cast<long>(random() % 19) - 9, bits);
  }
  return matrix;
}

TEST(Accumulate, IsTheFourfoldSum) {
  Random random(41);
  const Matrix horizontal = random_matrix(random, 4, 3);
  const Product product{&horizontal, random_matrix(random, 4, 3)};
  const Matrix in = random_matrix(random, 4, 4);
  Matrix out(3, 3, bits);
  out(1, 1) = Interval(5L, bits);
  accumulate(out, product, in);
  for (long c = 0; c < 3; ++c) {
    for (long d = 0; c + d < 3; ++d) {
      Interval sum(c == 1 && d == 1 ? 5L : 0L, bits);
      for (long a = 0; a < 4; ++a) {
        for (long b = 0; a + b < 4; ++b) sum += horizontal(a, c) * in(a, b) * product.vertical(b, d);
      }
      EXPECT_EQ(out(c, d).lower(), sum.lower()) << c << d;
    }
  }
}

TEST(ApplyWeights, CountsThePairsOfTheSector) {
  Matrix state(2, 2, bits);
  state(1, 0) = Interval(3L, bits);
  apply_weights(state, 4,
                {Interval(bits), Interval(bits), Interval(bits), Interval(bits), Interval(bits), Interval(7L, bits)});
  EXPECT_EQ(state(1, 0).lower(), 21);
}

TEST(Sectors, AreLimitedByTheSmallestCutOff) { EXPECT_EQ(sectors_within({5, 1, 7}), 1); }

TEST(StationSequence, BuildsAgainOnlyWhereSomethingChanged) {
  HeraldedChain link = heralded(test::alike_chain(3, "1/10", "1/2", "1/2", "1/100"));
  link.outcomes[2] = model::accepted_outcomes(model::Herald::psi_minus);
  const std::vector<long> cutoffs{2, 2, 2, 2};
  StationSequence stations(link, cutoffs, 0, bits);
  const StationOperator* first = &stations.at(0);
  EXPECT_EQ(first, &stations.at(1));
  EXPECT_FALSE(link.station(1) == link.station(2));
}

// The kept part grows with the cut-offs and never exceeds a probability, with all sectors added and analysers anywhere.
TEST(KeptPart, GrowsWithTheCutOffs) {
  test::for_each_case(5, 42, [](Random& random) {
    test::ChainRecipe recipe;
    recipe.largest_station_count = 2;
    recipe.smallest_lam = 0.05;
    const HeraldedChain link = heralded(test::random_chain(random, recipe));
    SCOPED_TRACE(test::describe_chain(link.chain));
    const EndAsk ask{model::Ask{model::Ask::Kind::clicks}, model::Ask{model::Ask::Kind::silent}};
    Interval before(bits);
    for (long cut = 1; cut <= 5; ++cut) {
      const Interval kept = kept_part(link, std::vector<long>(link.source_count(), cut), ask, ask,
                                      link.chain.left_end.analyser_deg, link.chain.right_end.analyser_deg, bits);
      EXPECT_TRUE(certainly_less(before, kept)) << cut;
      before = kept;
    }
  });
}

TEST(Cutoffs, FollowTheSources) {
  model::Chain chain = test::alike_chain(2, "1/100", "1/10", "1/5", "1/1000000");
  chain.sources[1].pair_parameter = Rational(1, 5);
  chain.sources[2] = {model::SourceKind::ideal_pair, Rational(1, 100)};
  const Cutoffs chosen = estimated_cutoffs(heralded(chain), {}, {}, -140);
  EXPECT_GT(chosen.pairs[1], 2 * chosen.pairs[0]);
  EXPECT_EQ(chosen.pairs[2], 1);
}

TEST(Cutoffs, EstimateTheHerald) {
  const HeraldedChain link = heralded(test::alike_chain(10, "1/50", "1/10", "1/5", "1/100000"));
  const double exact = kept_part(link, std::vector<long>(11, 9), {}, {}, 0, 0, bits).log2_mignitude();
  EXPECT_NEAR(estimated_cutoffs(link, {}, {}, exact - 60).log2_herald, exact, 0.5);
}

TEST(Cutoffs, RiseByWhatIsMissing) {
  const HeraldedChain link = heralded(test::alike_chain(1, "1/4", "1/10", "1/5", "1/100000"));
  EXPECT_EQ(raised_cutoffs(link, {100, 100}, -50, -60), (std::vector<long>{105, 105}));
  EXPECT_EQ(raised_cutoffs(link, {3, 3}, -50, -60), (std::vector<long>{4, 4}));
}

TEST(CertifiedTail, MeetsItsAimWithoutWaste) {
  test::for_each_case(20, 43, [](Random& random) {
    const HeraldedChain link = heralded(test::random_chain(random));
    SCOPED_TRACE(test::describe_chain(link.chain));
    const double aim = estimated_cutoffs(link, {}, {}, -60).log2_herald - 80;
    const CertifiedTail tail = certified_tail(link, {{}}, {{}}, aim);
    EXPECT_LE(hull(Interval(64), tail.largest).log2_width(), aim);
    EXPECT_GE(tail.largest.log2_mignitude(), aim - 16);
  });
}

// The long chain of weak sources for which 21 pairs a source suffice where bound 2 would ask for 67.
TEST(CertifiedTail, KeepsAboutTwentyPairsOnALongChain) {
  const HeraldedChain link = heralded(test::alike_chain(100, "1/100", "1/10", "1/5", "1/1000000"));
  const double herald = estimated_cutoffs(link, {}, {}, -60).log2_herald;
  const CertifiedTail tail = certified_tail(link, {{}}, {{}}, herald - 30 * std::log2(10.0));
  EXPECT_NEAR(static_cast<double>(tail.cutoffs[50]), 21, 1);
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
