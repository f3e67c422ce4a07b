// The printed gain of a direct link (Ma, Fung and Lo, Phys. Rev. A 76, 012307 (2007), from memory) against the model's.

#include "reference/closed_form/direct_pair_link.hpp"

#include <gtest/gtest.h>

#include "reference/enclose.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

// A direct link whose two detectors at each end are alike.
model::Chain direct_link(test::Random& random) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 0;
  model::Chain chain = test::random_chain(random, recipe);
  chain.left_end.detectors[1] = chain.left_end.detectors[0];
  chain.right_end.detectors[1] = chain.right_end.detectors[0];
  return chain;
}

TEST(MaFungLoGain, EqualsTheGainOfTheModel) {
  test::for_each_case(30, 11, [](test::Random& random) {
    const model::Chain chain = direct_link(random);
    Request request;
    request.quantities = {{model::QuantityKind::gain}};
    const auto exact = enclose(chain, request);
    const Field<Interval> field{256};
    const auto link = closed_form::direct_pair_link_of(field, chain);
    ASSERT_TRUE(exact && link);
    const Enclosure& enclosure = *exact->front().enclosure;
    const Interval published = closed_form::gain(field, *link);
    EXPECT_TRUE(published.lower() <= enclosure.upper && enclosure.lower <= published.upper())
        << test::describe_chain(chain);
    EXPECT_LT(published.log2_width(), -200);
  });
}

TEST(MaFungLoGain, IsRefusedForOtherChains) {
  using closed_form::direct_pair_link_of;
  const Field<Rational> field;
  EXPECT_FALSE(direct_pair_link_of(field, test::alike_chain(1, "1/100", "1", "1/2", "0")));
  model::Chain chain = test::alike_chain(0, "1/100", "1", "1/2", "0");
  EXPECT_TRUE(direct_pair_link_of(field, chain));
  chain.left_end.detectors[1].efficiency = model::Rational(1, 3);
  EXPECT_FALSE(direct_pair_link_of(field, chain));
}

}  // namespace
}  // namespace heraldgauge::reference
