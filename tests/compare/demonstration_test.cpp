// The demonstration shows what it says: digits vanish as stations are added, and the published gain holds.

#include "compare/demo/demonstration.hpp"

#include <gtest/gtest.h>

#include "tests/support/process.hpp"

namespace heraldgauge::compare {
namespace {

model::Scenario demo_scenario(const std::string& name) {
  const std::string file = std::string(HERALDGAUGE_SOURCE_DIR) + "/compare/demo/" + name;
  const auto scenario = model::read_scenario(test::contents_of(file), name);
  EXPECT_TRUE(scenario) << (scenario ? "" : model::describe(scenario.faults().front()));
  return *scenario;
}

TEST(Demonstration, ShowsDigitsVanishWithEachStation) {
  const auto report = against_subset_sum(demo_scenario("fibre_line.toml"));
  ASSERT_TRUE(report);
  ASSERT_EQ(report->points.size(), 3U);
  for (std::size_t row = 0; row < report->points[0].results.size(); ++row) {
    EXPECT_GE(report->points[0].results[row].digits_left, report->points[1].results[row].digits_left);
    EXPECT_GE(report->points[1].results[row].digits_left, report->points[2].results[row].digits_left);
  }
  EXPECT_GT(report->points[0].results[0].digits_left, 2);
  EXPECT_EQ(report->points[2].results[1].digits_left, 0);
}

TEST(Demonstration, HoldsThePublishedGainAgainstTheCertifiedOne) {
  const auto report = against_published_gain(demo_scenario("direct_link.toml"));
  ASSERT_TRUE(report);
  EXPECT_GE(report->points.at(0).results.at(0).digits_left, 29);
}

TEST(Demonstration, RefusesAGainThatThePaperDoesNotGive) {
  EXPECT_FALSE(against_published_gain(demo_scenario("fibre_line.toml")));
}

}  // namespace
}  // namespace heraldgauge::compare
