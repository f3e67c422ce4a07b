// Every bound against the true tail: the kept part at much larger cut-offs less the kept part at small ones.
#include "reference/pair_number/tail_bound.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "reference/pair_number/source_weights.hpp"
#include "tests/reference/pair_number/kept_part.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Ask;
using model::Rational;
using test::Random;

constexpr Precision bits = 256;
const Ask silent{Ask::Kind::silent};
const Ask clicks{Ask::Kind::clicks};

std::vector<long> random_cutoffs(Random& random, std::size_t sources, long most) {
  std::vector<long> cutoffs;
  for (std::size_t k = 0; k < sources; ++k)
    cutoffs.push_back(1 + static_cast<long>(random() % static_cast<unsigned long>(most)));
  return cutoffs;
}

// A lower bound on the tail; the analysers stand at 0 degrees.
Interval part_of_tail(const HeraldedChain& link, const std::vector<long>& cutoffs, const EndAsk& left,
                      const EndAsk& right, long more) {
  std::vector<long> larger;
  for (long cutoff : cutoffs) larger.push_back(cutoff + more);
  return kept_part(link, larger, left, right, 0, 0, bits) - kept_part(link, cutoffs, left, right, 0, 0, bits);
}

double log2_upper(const Interval& x) { return hull(Interval(x.precision()), x).log2_width(); }

// log2 of bound 3 over the true tail.
double looseness(Random& random) {
  test::ChainRecipe recipe;
  recipe.free_angles = false;
  recipe.smallest_dark = 1e-7;
  const HeraldedChain link = heralded(test::random_chain(random, recipe));
  SCOPED_TRACE(test::describe_chain(link.chain));
  const std::vector<long> cutoffs = random_cutoffs(random, link.source_count(), 5);
  const EndAsk left{clicks, silent};
  const EndAsk right = random() % 2 == 0 ? EndAsk{} : EndAsk{silent, clicks};
  const Interval tail = part_of_tail(link, cutoffs, left, right, 12);
  EXPECT_TRUE(tail.is_certainly_positive());
  const Interval third = tail_by_operators(link, cutoffs, {left}, {right}, 64)[0][0];
  const Interval second = tail_by_places(link, cutoffs, left, right, 64);
  const Interval first = tail_by_pair_numbers(link.chain, cutoffs, 64);
  EXPECT_FALSE(certainly_less(third, tail));
  EXPECT_LE(log2_upper(third), log2_upper(second) + 1e-9);
  EXPECT_LE(log2_upper(second), log2_upper(first) + 0.5);  // the two close an infinite sum differently
  return log2_upper(third) - log2_upper(tail);
}

TEST(TailBounds, HoldAndAreTightOnRandomChains) {
  std::vector<double> all;
  test::for_each_case(40, 31, [&all](Random& random) { all.push_back(looseness(random)); });
  std::sort(all.begin(), all.end());
  RecordProperty("log10_median", std::to_string(all[all.size() / 2] * std::log10(2.0)));
  RecordProperty("log10_worst", std::to_string(all.back() * std::log10(2.0)));
  EXPECT_LT(all.back(), std::log2(1e6));
}

// As long as the bound is small against the herald; else configurations with several sources beyond dominate it.
TEST(TailBounds, DoNotLoosenAlongTheChain) {
  const auto loose = [](std::size_t stations) {
    const HeraldedChain link = heralded(test::alike_chain(stations, "1/20", "1/10", "1/5", "1/1000000"));
    const std::vector<long> cutoffs(link.source_count(), 6);
    const Interval bound = tail_by_operators(link, cutoffs, {{}}, {{}}, 64)[0][0];
    return log2_upper(bound) - log2_upper(part_of_tail(link, cutoffs, {}, {}, 8));
  };
  const double short_chain = loose(4);
  EXPECT_GE(loose(40), 0);
  EXPECT_LT(loose(40), short_chain + 1);
}

TEST(TailBounds, CountResolvedPhotons) {
  test::for_each_case(5, 32, [](Random& random) {
    test::ChainRecipe recipe;
    recipe.free_angles = recipe.thermal_allowed = false;
    recipe.smallest_station_count = recipe.largest_station_count = 1;
    const model::Chain chain = test::random_chain(random, recipe);
    model::Pattern pattern;
    pattern.stations = {{Ask{Ask::Kind::counts, 2}, clicks, silent, Ask{Ask::Kind::counts, 1}}};
    const HeraldedChain link = with_pattern(chain, pattern);
    const std::vector<long> cutoffs{2, 3};
    const Interval bound = tail_by_operators(link, cutoffs, {{}}, {{}}, 64)[0][0];
    EXPECT_FALSE(certainly_less(bound, part_of_tail(link, cutoffs, {}, {}, 12)));
    EXPECT_FALSE(certainly_less(tail_by_places(link, cutoffs, {}, {}, 64), bound));
  });
}

TEST(TailBounds, VanishWhereNothingIsLeftOut) {
  model::Chain chain = test::alike_chain(2, "1/3", "1/10", "1/5", "1/1000");
  for (model::Source& source : chain.sources) source.kind = model::SourceKind::ideal_pair;
  const std::vector<long> one{1, 1, 1};
  EXPECT_TRUE(tail_by_pair_numbers(chain, one, 64).is_exactly_zero());
  EXPECT_TRUE(tail_by_places(heralded(chain), one, {}, {}, 64).is_exactly_zero());
  EXPECT_TRUE(tail_by_operators(heralded(chain), one, {{}}, {{}}, 64)[0][0].is_exactly_zero());
}

// The last weight stands for a geometric majorant of sum_{n >= M} pi(n) C(n, r) C(n, r').
TEST(ClosedPairProbabilities, BoundInfiniteSums) {
  test::for_each_case(40, 33, [](Random& random) {
    const model::Source source{model::SourceKind::squeezed, Rational(test::uniform(random, 1e-3, 0.8))};
    const long first = static_cast<long>(random() % 5), second = static_cast<long>(random() % 5);
    const long cutoff = static_cast<long>(random() % 6);
    const auto closed = closed_pair_probabilities(source, cutoff, first, second, bits);
    const long last = static_cast<long>(closed.size()) - 1;
    ASSERT_GT(last, cutoff);
    const auto choose = [](long n, long r) {
      model::Integer ways;
      mpz_bin_uiui(ways.get_mpz_t(), static_cast<unsigned long>(n), static_cast<unsigned long>(r));
      return Interval(Rational(ways), bits);
    };
    const auto open = pair_probabilities(source, last + 400, bits);
    Interval sum(bits);
    for (long n = last; n <= last + 400; ++n)
      sum += open[static_cast<std::size_t>(n)] * choose(n, first) * choose(n, second);
    const Interval bound = closed.back() * choose(last, first) * choose(last, second);
    EXPECT_FALSE(certainly_less(bound, sum));
    EXPECT_LT(log2_upper(bound), log2_upper(sum) + 4);
  });
}

TEST(ClosedPairProbabilities, EndAtTheCutOffWhereASourceDoes) {
  EXPECT_EQ(closed_pair_probabilities({model::SourceKind::ideal_pair, Rational(1, 2)}, 1, 2, 2, bits).size(), 2u);
  EXPECT_EQ(closed_pair_probabilities({model::SourceKind::squeezed, Rational(0)}, 0, 2, 2, bits).size(), 1u);
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
