// Departures that depart by nothing must give the exact values: a cut-off far out against the determinant route, in
// binary64 and as enclosures that must overlap and be narrow.

#include <gtest/gtest.h>

#include "compare/registry.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;

std::vector<Quantity> probability_quantities() {
  std::vector<Quantity> quantities = model::all_quantities(false);
  std::erase_if(quantities, touches_capacities);
  return quantities;
}

Case random_case(test::Random& random, int stations) {
  test::ChainRecipe recipe;
  recipe.smallest_station_count = recipe.largest_station_count = stations;
  recipe.smallest_lam = 1e-3;
  recipe.largest_lam = 0.02;
  recipe.smallest_transmission = 0.1;
  return {nullptr, {}, test::random_chain(random, recipe), std::nullopt};
}

// lam <= 0.02 and 14 pairs: what is left out is below 1e-22 per trial.
TEST(FockDeparture, FarCutoffIsTheModel) {
  const Departure& cutoff = *find_departure("pair-cutoff");
  const auto quantities = probability_quantities();
  test::for_each_case(6, 1, [&](test::Random& random) {
    const Case point = random_case(random, static_cast<int>(random() % 3));
    SCOPED_TRACE(test::describe_chain(point.chain));
    reference::Request request;
    request.quantities = quantities;
    request.digits = 15;
    const auto exact = reference::enclose(point.chain, request);
    ASSERT_TRUE(exact);
    const auto values = cutoff.evaluate(point, quantities, model::Rational(14));
    for (std::size_t i = 0; i < quantities.size(); ++i) {
      SCOPED_TRACE(model::name_of(quantities[i]));
      if (!exact.value()[i].enclosure) continue;
      ASSERT_EQ(values[i].status, fast::Status::computed) << values[i].reason;
      const double expected = exact.value()[i].enclosure->lower.get_d();
      EXPECT_NEAR(fast::to_binary64(values[i].value), expected, 1e-7 * std::abs(expected) + 1e-18);
    }
  });
}

TEST(FockDeparture, EnclosuresOverlapTheModel) {
  const Departure& cutoff = *find_departure("pair-cutoff");
  const auto quantities = probability_quantities();
  test::for_each_case(2, 2, [&](test::Random& random) {
    const Case point = random_case(random, static_cast<int>(random() % 2));
    SCOPED_TRACE(test::describe_chain(point.chain));
    reference::Request request;
    request.quantities = quantities;
    request.digits = 12;
    const auto exact = reference::enclose(point.chain, request);
    ASSERT_TRUE(exact);
    const auto values = cutoff.enclose(point, quantities, model::Rational(14), 12);
    for (std::size_t i = 0; i < quantities.size(); ++i) {
      SCOPED_TRACE(model::name_of(quantities[i]));
      if (!exact.value()[i].enclosure) continue;
      ASSERT_TRUE(values[i].enclosure) << values[i].reason;
      const reference::Enclosure& e = *exact.value()[i].enclosure;
      const reference::Enclosure& s = *values[i].enclosure;
      const double size = std::abs(e.lower.get_d());
      EXPECT_NEAR(s.lower.get_d(), e.lower.get_d(), 1e-7 * size + 1e-18);
      EXPECT_LE(model::Rational(s.upper - s.lower).get_d(), 1e-12 * size + 1e-25);
    }
  });
}

}  // namespace
}  // namespace heraldgauge::compare
