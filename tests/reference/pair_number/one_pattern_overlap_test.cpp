// The two certified routes on many chains: the herald, and one accepted string of outcomes with exact clicks at both
// ends. HERALDGAUGE_TEST_EFFORT=25 makes it 500 chains at each number of digits.

#include <gtest/gtest.h>

#include <cmath>

#include "reference/determinant/route.hpp"
#include "reference/pair_number/route.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Ask;
using test::Random;

// Weaker sources for more digits, so that the pairs to be kept stay few.
model::Chain chain_for(Random& random, int digits) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 4;
  recipe.largest_lam = digits <= 20 ? 0.1 : digits <= 50 ? 1e-2 : 1e-6;
  recipe.smallest_lam = recipe.largest_lam * 1e-3;
  return test::random_chain(random, recipe);
}

Ask click_or_silence(Random& random) { return Ask{random() % 2 == 0 ? Ask::Kind::clicks : Ask::Kind::silent}; }

model::Pattern accepted_pattern(Random& random, const model::Chain& chain) {
  model::Pattern pattern;
  for (const model::Station& station : chain.stations) {
    const auto outcomes = model::accepted_outcomes(station.herald);
    pattern.stations.push_back(outcomes[random() % outcomes.size()].detectors);
  }
  pattern.left = {Ask{Ask::Kind::clicks}, click_or_silence(random)};
  pattern.right = {click_or_silence(random), click_or_silence(random)};
  return pattern;
}

class OnePatternOverlap : public testing::TestWithParam<int> {};

TEST_P(OnePatternOverlap, OnRandomChains) {
  const int digits = GetParam();
  test::for_each_case(20, 900 + static_cast<std::uint64_t>(digits), [digits](Random& random) {
    const model::Chain chain = chain_for(random, digits);
    SCOPED_TRACE(test::describe_chain(chain));
    const model::Pattern pattern = accepted_pattern(random, chain);
    const double asked = std::log2(10.0) * digits;
    const double log2_herald = pair_number_log2_herald(chain);
    const auto pair_number = make_pair_number_route(chain);
    const auto determinant = make_determinant_route(chain);
    const Accuracy cut{static_cast<Precision>(asked) + 64, log2_herald - asked - 40};
    // The signed sum cancels down to the herald probability, so that many bits more.
    const Accuracy uncut{static_cast<Precision>(asked - log2_herald) + 228, 0};
    const Interval by_pairs = pair_number->herald(cut).value;
    const Interval by_determinants = determinant->herald(uncut).value;
    EXPECT_TRUE(overlap(by_pairs, by_determinants));
    EXPECT_LT(by_pairs.log2_width(), by_pairs.log2_mignitude() - asked);
    EXPECT_LT(by_determinants.log2_width(), by_determinants.log2_mignitude() - asked);
    EXPECT_TRUE(overlap(pair_number->pattern(pattern, cut).value, determinant->pattern(pattern, uncut).value));
  });
}

INSTANTIATE_TEST_SUITE_P(Digits, OnePatternOverlap, testing::Values(20, 50, 200));

}  // namespace
}  // namespace heraldgauge::reference
