// The direct binary64 sum must be the right formula (it agrees with certified values where nothing cancels) and must
// lose its digits where the terms cancel.

#include <gtest/gtest.h>

#include "compare/digits.hpp"
#include "compare/subset_sum/subset_sum.hpp"
#include "reference/enclose.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;

std::vector<Quantity> herald_and_ends() {
  std::vector<Quantity> quantities = {{QuantityKind::herald_probability}};
  for (int outcome = 0; outcome < 16; ++outcome) quantities.push_back({QuantityKind::end_pattern, outcome});
  return quantities;
}

double value_of(const SubsetSum& sum, const Quantity& quantity) {
  if (quantity.kind == QuantityKind::herald_probability) return sum.herald;
  const auto outcome = static_cast<std::size_t>(quantity.outcome);
  return sum.joint[outcome / 4][outcome % 4] / sum.herald;
}

// The digits of the sum that are right, the fewest over herald probability and end patterns.
int fewest_digits(const model::Chain& chain) {
  const auto sum = subset_sum<double>(chain);
  reference::Request request;
  request.quantities = herald_and_ends();
  const auto exact = reference::enclose(chain, request);
  EXPECT_TRUE(sum && exact);
  int fewest = most_digits;
  for (const reference::Result& result : *exact) {
    const double value = value_of(*sum, result.quantity);
    fewest = std::min(fewest, agreeing_digits(model::Rational(value), *result.enclosure));
  }
  return fewest;
}

TEST(SubsetSumBinary64, IsTheRightFormulaWhereNothingCancels) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 2;
  recipe.smallest_lam = 0.2, recipe.largest_lam = 0.6;
  recipe.smallest_transmission = 0.5;
  recipe.smallest_dark = 1e-3, recipe.largest_dark = 0.2;
  test::for_each_case(12, 7, [&](test::Random& random) {
    const model::Chain chain = test::random_chain(random, recipe);
    // 2^-53 against end patterns down to 1e-6 with a few hundred terms leaves at least this many.
    EXPECT_GE(fewest_digits(chain), 6) << test::describe_chain(chain);
  });
}

TEST(SubsetSumBinary64, LosesItsDigitsWhereTheTermsCancel) {
  EXPECT_GE(fewest_digits(test::alike_chain(0, "1/100", "1", "1/100", "1/10000000")), 3);
  EXPECT_LE(fewest_digits(test::alike_chain(1, "1/100", "1", "1/100", "1/10000000")), 3);
  EXPECT_EQ(fewest_digits(test::alike_chain(2, "1/100", "1", "1/100", "1/10000000")), 0);
}

TEST(SubsetSumBinary64, RefusesWhatTheFormulaDoesNotCover) {
  model::Chain chain = test::alike_chain(1, "1/100", "1", "1/2", "0");
  chain.sources[0].kind = model::SourceKind::ideal_pair;
  EXPECT_FALSE(subset_sum<double>(chain));
  chain = test::alike_chain(1, "1/100", "1", "1/2", "0");
  chain.right_end.detectors[1].kind = model::DetectorKind::resolving;
  EXPECT_FALSE(subset_sum<double>(chain));
  EXPECT_FALSE(subset_sum<double>(test::alike_chain(largest_subset_sum_stations + 1, "1/100", "1", "1/2", "0")));
}

}  // namespace
}  // namespace heraldgauge::compare
