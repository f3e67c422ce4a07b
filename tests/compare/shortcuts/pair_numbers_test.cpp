// Shortcuts about pair numbers, where the answer is known by hand: one source between two perfect ends, so that each
// end clicks exactly where there is a pair, with pi(n) = (n+1) lam^n (1-lam)^2.

#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

const Rational lam(1, 5);

Case perfect() { return case_of(test::alike_chain(0, "1/5", "1/1", "1/1", "0/1")); }

Rational pairs(long n) {
  Rational probability = (1 - lam) * (1 - lam) * (n + 1);
  for (long i = 0; i < n; ++i) probability *= lam;
  return probability;
}

Rational pairs_from_to(long first, long last) {
  Rational sum = 0;
  for (long n = first; n <= last; ++n) sum += pairs(n);
  return sum;
}

TEST(PairCutoff, KeepsTheProbabilityOfUpToMPairs) {
  for (const long m : {1L, 2L, 4L}) {
    expect_encloses(enclosure_by("pair-cutoff", perfect(), "gain", Rational(m)), pairs_from_to(1, m));
  }
}

TEST(PairCutoff, ErrorIsTheMissingTailAndPessimistic) {
  const auto error = error_of("pair-cutoff", perfect(), "gain", Rational(3));
  const Rational exact = 1 - pairs(0);
  ASSERT_TRUE(error.certified);
  expect_encloses(*error.certified, -(1 - pairs_from_to(0, 3)) / exact);
  EXPECT_EQ(error.bias, Bias::pessimistic);
}

// lam = 1e-3 and three pairs: what is left out is P(n > 3)/P(n > 0) < 5 lam^4 / (2 lam).
TEST(PairCutoff, ThreePairsAreEnoughForWeakSources) {
  const Case weak = case_of(test::alike_chain(0, "1/1000", "1/1", "1/1", "0/1"));
  EXPECT_TRUE(error_of("pair-cutoff", weak, "gain", Rational(3)).certainly_within(Rational(3) / 1000000000));
  EXPECT_TRUE(error_of("pair-cutoff", perfect(), "gain", Rational(1)).certainly_beyond(Rational(1, 10)));
}

TEST(PairCutoffRenormalised, DividesByWhatIsKept) {
  expect_encloses(enclosure_by("pair-cutoff-renormalised", perfect(), "gain", Rational(2)),
                  pairs_from_to(1, 2) / pairs_from_to(0, 2));
}

// H and V apart are geometric, so each keeps 1 - lam^(m+1).
TEST(PairCutoffPerMode, KeepsASquareOfPhotonNumbers) {
  const Rational kept = 1 - lam * lam * lam;
  expect_encloses(enclosure_by("pair-cutoff-per-mode", perfect(), "gain", Rational(2)), kept * kept - pairs(0));
}

// At 45 degrees a cut per mode is not even the same state: HH + VV keeps its two pairs of one kind and loses the
// others.
TEST(PairCutoffPerMode, DependsOnTheAnalyserWhereTheModelDoesNot) {
  Case turned = perfect();
  turned.chain.left_end.analyser_deg = turned.chain.right_end.analyser_deg = 45;
  const auto straight = enclosure_by("pair-cutoff-per-mode", perfect(), "end_pattern_1010", Rational(1));
  const auto diagonal = enclosure_by("pair-cutoff-per-mode", turned, "end_pattern_1010", Rational(1));
  EXPECT_LT(straight.upper, diagonal.lower);
  const auto whole = enclosure_by("pair-cutoff", perfect(), "end_pattern_1010", Rational(2));
  const auto whole_turned = enclosure_by("pair-cutoff", turned, "end_pattern_1010", Rational(2));
  EXPECT_LE(whole.lower, whole_turned.upper);
  EXPECT_LE(whole_turned.lower, whole.upper);
}

TEST(TotalPairCutoff, IsThePairCutoffForOneSource) {
  expect_encloses(enclosure_by("total-pair-cutoff", perfect(), "gain", Rational(2)), pairs_from_to(1, 2));
}

// Two perfect sources and one pair in all: no station outcome is possible without dark counts.
TEST(TotalPairCutoff, CountsThePairsOfAllSources) {
  const Case two = case_of(test::alike_chain(1, "1/5", "1/1", "1/1", "0/1"));
  EXPECT_EQ(enclosure_by("total-pair-cutoff", two, "herald_probability", Rational(1)).upper, 0);
  EXPECT_GT(enclosure_by("pair-cutoff", two, "herald_probability", Rational(1)).lower, 0);
}

TEST(PairCutoffAfterHerald, LeavesTheHeraldAlone) {
  const Case one = case_of(test::alike_chain(1, "1/5", "1/2", "1/2", "1/1000"));
  EXPECT_EQ(error_of("pair-cutoff-after-herald", one, "herald_probability", Rational(1)).bias, Bias::exact);
  const auto cut = enclosure_by("pair-cutoff", one, "gain", Rational(2));
  const auto after = enclosure_by("pair-cutoff-after-herald", one, "gain", Rational(2));
  EXPECT_LE(cut.lower, after.upper);
  EXPECT_LE(after.lower, cut.upper);
}

// One pair with probability 1 - (1-lam)^2, seen by two ends of efficiency 1/2.
TEST(SinglePair, GivesTheBellState) {
  const Case lossy = case_of(test::alike_chain(0, "1/5", "1/1", "1/2", "0/1"));
  expect_encloses(enclosure_by("single-pair", lossy, "gain"), (1 - pairs(0)) / 4);
  expect_encloses(enclosure_by("single-pair", lossy, "end_pattern_1010"), (1 - pairs(0)) / 8);
}

// An emission at all has the probability 1 - exp(-2 mu).
TEST(PoissonPairs, HaveTheSameMean) {
  const double mu = 0.25;
  expect_near(enclosure_by("poisson-pairs", perfect(), "gain"), 1 - std::exp(-2 * mu), 1e-14);
}

// Visibility of independent pairs at vanishing efficiency, 1/(1 + 2 mu) (Takesue and Shimizu 2010, from memory),
// against (1 + mu)/(1 + 3 mu) of the model.
TEST(DistinguishablePairs, HaveTheKnownVisibility) {
  const Case dim = case_of(test::alike_chain(0, "1/21", "1/1000", "1/1000", "0/1"));  // mu = 1/20
  expect_near(enclosure_by("distinguishable-pairs", dim, "visibility"), 1 / 1.1, 1e-5);
  expect_near(enclosure_by("distinguishable-pairs", perfect(), "gain"), 1 - std::exp(-0.5), 1e-14);
}

// One photon pair of H at lam (1-lam) in the model, at lam in leading order: the error is lam/(1-lam).
TEST(LeadingOrder, DropsTheNormalisation) {
  const auto error = error_of("leading-order", perfect(), "end_pattern_1010");
  ASSERT_TRUE(error.certified);
  expect_encloses(*error.certified, lam / (1 - lam));
}

// One station, all perfect: a pair from each source is projected onto psi+ with probability 1/4, 4 lam^2/4; two pairs
// of one source, one H and one V photon, go to the same output half of the time, lam^2/2 for each source. Together 2
// lam^2.
TEST(LeadingOrder, CountsAllTermsOfTheSameOrder) {
  const Case one = case_of(test::alike_chain(1, "1/5", "1/1", "1/1", "0/1"));
  expect_encloses(enclosure_by("leading-order", one, "herald_probability"), 2 * lam * lam);
}

// With dark counts the lowest power of lam is the zeroth: 2 d^2 (1-d)^2.
TEST(LeadingOrder, IsOnlyDarkCountsWhereThereAreAny) {
  const Case one = case_of(test::alike_chain(1, "1/5", "1/1", "1/1", "1/10"));
  expect_encloses(enclosure_by("leading-order", one, "herald_probability"), Rational(2 * 81) / 10000);
  const auto visibility = enclosure_by("leading-order", one, "visibility");  // no angle matters to a dark count
  EXPECT_LE(visibility.lower, 0);
  EXPECT_GE(visibility.upper, 0);
  EXPECT_LE(Rational(visibility.upper - visibility.lower), Rational(1, 1000000000));
}

// A ratio of two terms of the same order does not depend on lam, and is the exact one in the limit.
TEST(LeadingOrder, GivesTheVisibilityOfVanishingPairParameters) {
  const Case one = case_of(test::alike_chain(1, "1/5", "1/2", "1/2", "0/1"));
  const Case weak = case_of(test::alike_chain(1, "1/1000000", "1/2", "1/2", "0/1"));
  const auto strong_visibility = enclosure_by("leading-order", one, "visibility");
  const auto weak_visibility = enclosure_by("leading-order", weak, "visibility");
  EXPECT_LE(strong_visibility.lower, weak_visibility.upper);
  EXPECT_GE(strong_visibility.upper, weak_visibility.lower);
  EXPECT_TRUE(error_of("leading-order", weak, "visibility").certainly_within(Rational(1, 100000)));
}

}  // namespace
}  // namespace heraldgauge::compare
