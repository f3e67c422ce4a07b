// The ledger over a sweep, frontiers and budgets, on chains where the errors are known by hand.

#include "compare/ledger_command.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "compare/frontier_command.hpp"
#include "reference/model/exact_number.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

// One source between perfect ends: the gain without a cut is 1 - (1-lam)^2, with one pair 2 lam (1-lam)^2.
model::Scenario scenario(const std::string& more) {
  const auto read = model::read_scenario(R"(
chain.stations = 0
channel.transmittance = 1
end.detector.efficiency = 1
ask.quantities = ["gain", "capacity_arm"]
)" + more,
                                         "link.toml");
  if (!read) throw std::runtime_error(model::describe(read.faults().front()));
  return *read;
}

model::Scenario swept() {
  return scenario("[[sweep]]\nkey = \"source.pair_parameter\"\nvalues = [\"1/10\", \"1/5\", \"3/10\", \"1/2\"]\n");
}

Rational one_pair_error(const Rational& lam) {
  return 2 * lam * (1 - lam) * (1 - lam) / (1 - (1 - lam) * (1 - lam)) - 1;
}

LedgerOptions only(const std::vector<std::string>& ids) {
  LedgerOptions options;
  options.quantities = {{model::QuantityKind::gain}};
  options.shortcuts = ids;
  options.threads = 1;
  return options;
}

TEST(Ledger, GivesEachErrorAndWhereItIsWorst) {
  const auto report = ledger_command(swept(), only({"pair-cutoff=1"}));
  ASSERT_TRUE(report);
  ASSERT_EQ(report->points.size(), 4U);
  const std::vector<Rational> lams = {Rational(1, 10), Rational(1, 5), Rational(3, 10), Rational(1, 2)};
  for (std::size_t i = 0; i < lams.size(); ++i) {
    const reports::LedgerRow& row = report->points[i].shortcuts.at(0);
    EXPECT_EQ(row.setting, "1");
    EXPECT_LE(*model::parse_exact(*row.relative_error_lower), one_pair_error(lams[i]));
    EXPECT_GE(*model::parse_exact(*row.relative_error_upper), one_pair_error(lams[i]));
    EXPECT_EQ(row.direction, "pessimistic");
    EXPECT_EQ(row.digits_left, one_pair_error(lams[i]) > Rational(-1, 10) ? 1 : 0);
  }
  const reports::LedgerSummary& sum = report->summary.at(0);
  EXPECT_EQ(sum.points, 4);
  EXPECT_EQ(sum.certified, 4);
  EXPECT_EQ(sum.worst_at, "source.pair_parameter = 0.5");
  EXPECT_NEAR(std::stod(*sum.worst), -one_pair_error(Rational(1, 2)).get_d(), 1e-5);
  EXPECT_NEAR(std::stod(*sum.median), -one_pair_error(Rational(1, 5)).get_d(), 1e-5);
  EXPECT_NEAR(std::stod(*sum.percentile_90), -one_pair_error(Rational(1, 2)).get_d(), 1e-5);
}

TEST(Ledger, ListsOnlyWhatAShortcutTouchesUnlessAsked) {
  LedgerOptions options = only({"linear-capacity"});
  options.quantities.clear();
  auto unasked = swept();
  unasked.quantities.clear();
  const auto report = ledger_command(unasked, options);
  ASSERT_TRUE(report);
  for (const reports::LedgerRow& row : report->points[0].shortcuts) EXPECT_EQ(row.quantity.substr(0, 9), "capacity_");
  const auto asked = ledger_command(swept(), only({"linear-capacity"}));
  EXPECT_EQ(asked->points[0].shortcuts.at(0).direction, "exact");
}

// Error of poor detectors in two shortcuts of opposite sign: one pair keeps 1 - pi(0) too little by a tail, lumping
// does nothing here, so it adds; with a cut and full responses the two do not.
TEST(Ledger, TellsWhereTwoErrorsDoNotAdd) {
  const auto bright =
      scenario("source.pair_parameter = \"1/2\"\n[override]\n\"arm.0.left.transmittance\" = \"1/100\"\n");
  const auto report = ledger_command(bright, only({"pair-cutoff=1", "linear-loss", "lumped-arms"}));
  ASSERT_TRUE(report);
  ASSERT_FALSE(report->pairs.empty());
  bool found = false;
  for (const reports::LedgerPair& pair : report->pairs) {
    if (pair.first == "pair-cutoff" && pair.second == "lumped-arms") {
      found = true;
      EXPECT_EQ(pair.verdict, "does not add");
    }
  }
  EXPECT_TRUE(found);
}

TEST(Ledger, ComparesWithABudget) {
  LedgerOptions options = only({"pair-cutoff=1"});
  const auto strict = read_budget("[shortcuts.pair-cutoff]\ngain = { relative = \"0.25\" }\n", "allowed.toml");
  ASSERT_TRUE(strict) << model::describe(strict.faults().front());
  options.budget = *strict;
  const auto report = ledger_command(swept(), options);
  ASSERT_TRUE(report);
  // |error| is 0.147, 0.289, 0.424, 0.667.
  EXPECT_EQ(report->breaches.size(), 3U);
  options.shortcuts = {"pair-cutoff=8"};
  EXPECT_TRUE(ledger_command(scenario("source.pair_parameter = 0.1\n"), options)->breaches.empty());
}

TEST(Ledger, RefusesUnknownShortcutsAndSettings) {
  const auto faults = ledger_command(swept(), only({"pair-cutof", "linear-loss=2", "pair-cutoff=2.5"})).faults();
  ASSERT_EQ(faults.size(), 3U);
  EXPECT_NE(faults[0].wrong.find("did you mean pair-cutoff"), std::string::npos);
}

// |2 lam (1-lam)^2 / (1-(1-lam)^2) - 1| = 1 - 2 (1-lam)^2/(2-lam) = 1/4 at the root of 8 (1-lam)^2 = 3 (2-lam).
TEST(Frontier, BracketsTheCrossing) {
  FrontierOptions options;
  options.shortcut = "pair-cutoff=1";
  options.quantity = {model::QuantityKind::gain};
  options.error = Rational(1, 4);
  options.axes = {{"source.pair_parameter", Rational(1, 100), Rational(9, 10)}};
  options.threads = 1;
  const auto answer = frontier_command(scenario("source.pair_parameter = 0.1\n"), options);
  ASSERT_TRUE(answer) << model::describe(answer.faults().front());
  EXPECT_TRUE(answer->decided);
  const double crossing = (13 - std::sqrt(13.0 * 13 - 4 * 8 * 2)) / 16;
  const double inside = model::parse_exact(*answer->report.inside)->get_d();
  const double outside = model::parse_exact(*answer->report.outside)->get_d();
  EXPECT_LE(inside, crossing);
  EXPECT_GE(outside, crossing);
  EXPECT_LE(outside - inside, 1e-6);
}

TEST(Frontier, SaysWhereTheWholeRangeIsInside) {
  FrontierOptions options;
  options.shortcut = "pair-cutoff=1";
  options.quantity = {model::QuantityKind::gain};
  options.error = Rational(1, 2);
  options.axes = {{"source.pair_parameter", Rational(1, 100), Rational(1, 50)}};
  const auto answer = frontier_command(scenario("source.pair_parameter = 0.1\n"), options);
  ASSERT_TRUE(answer);
  EXPECT_EQ(answer->report.inside, "0.02");
  EXPECT_FALSE(answer->report.outside);
}

TEST(Frontier, MapsTwoKeys) {
  FrontierOptions options;
  options.shortcut = "pair-cutoff=1";
  options.quantity = {model::QuantityKind::gain};
  options.error = Rational(1, 4);
  options.axes = {{"source.pair_parameter", Rational(1, 10), Rational(3, 10)},
                  {"end.detector.dark_probability", 0, Rational(1, 100)}};
  options.points = 3;
  options.threads = 1;
  const auto answer = frontier_command(scenario("source.pair_parameter = 0.1\n"), options);
  ASSERT_TRUE(answer) << model::describe(answer.faults().front());
  ASSERT_EQ(answer->report.map.size(), 9U);
  EXPECT_EQ(answer->report.map[0].within, "yes");
  EXPECT_EQ(answer->report.map[6].within, "no");
  EXPECT_NEAR(std::stod(*answer->report.map[0].relative_error), one_pair_error(Rational(1, 10)).get_d(), 1e-5);
}

TEST(Frontier, RefusesASweptScenarioAndEmptyRanges) {
  FrontierOptions options;
  options.shortcut = "pair-cutoff";
  options.quantity = {model::QuantityKind::gain};
  options.error = 1;
  options.axes = {{"source.pair_parameter", Rational(1, 2), Rational(1, 2)}};
  const auto answer = frontier_command(swept(), options);
  ASSERT_FALSE(answer);
  EXPECT_EQ(answer.faults().size(), 2U);
}

}  // namespace
}  // namespace heraldgauge::compare
