#include "compare/points.hpp"

#include <gtest/gtest.h>

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;

const Quantity gain{QuantityKind::gain};
const Quantity rate{QuantityKind::key_rate};

TEST(QuantitiesToGive, TakeTheCommandLineBeforeTheScenario) {
  model::Scenario scenario;
  scenario.quantities = {rate};
  EXPECT_EQ(quantities_to_give({gain}, scenario, false), std::vector{gain});
  EXPECT_EQ(quantities_to_give({}, scenario, false), std::vector{rate});
}

TEST(QuantitiesToGive, AreAllThatApplyWhereNothingIsAsked) {
  model::Scenario scenario;
  EXPECT_EQ(quantities_to_give({}, scenario, false), model::all_quantities(false));
  scenario.pattern.emplace();
  EXPECT_EQ(quantities_to_give({}, scenario, false), model::all_quantities(true));
}

TEST(QuantitiesToGive, LeaveOutTheIrrationalOnesOnlyWhereNothingIsAsked) {
  model::Scenario scenario;
  for (const Quantity& one : quantities_to_give({}, scenario, true)) EXPECT_FALSE(model::entry_of(one).irrational);
  EXPECT_EQ(quantities_to_give({}, scenario, true).size(), model::all_quantities(false).size() - 8);
  EXPECT_EQ(quantities_to_give({rate}, scenario, true), std::vector{rate});
}

TEST(DistinctFaults, KeepTheOrderAndDropRepetitions) {
  const model::Fault a{{"file", 1, 1, ""}, "a", ""};
  const model::Fault b{{"file", 2, 1, ""}, "b", ""};
  const model::Faults kept = distinct({b, a, b, a});
  ASSERT_EQ(kept.size(), 2U);
  EXPECT_EQ(kept[0].wrong, "b");
  EXPECT_EQ(kept[1].wrong, "a");
}

}  // namespace
}  // namespace heraldgauge::compare
