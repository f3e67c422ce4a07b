// The commands ledger and frontier as a user runs them: shape, statuses, budgets.

#include <gtest/gtest.h>

#include <fstream>
#include <nlohmann/json.hpp>

#include "tests/cli/program.hpp"
#include "tests/support/json_schema.hpp"

namespace heraldgauge::test {
namespace {

using nlohmann::json;

TEST(LedgerCommand, AnswersInItsSchema) {
  const ProcessResult result =
      heraldgauge({"ledger", "-", "--shortcut", "pair-cutoff=2", "--shortcut", "lumped-arms", "--format", "json"},
                  small_scenario());
  ASSERT_EQ(result.status, 0) << result.err;
  EXPECT_EQ(schema_faults("ledger", result.out), "");
  const json row = json::parse(result.out)["points"][0]["shortcuts"][0];
  EXPECT_EQ(row["shortcut"], "pair-cutoff");
  EXPECT_EQ(row["setting"], "2");
  EXPECT_FALSE(row["relative_error_lower"].is_null());
}

TEST(LedgerCommand, EndsWithOneOutsideTheBudget) {
  const TemporaryFolder folder;
  for (const auto& [allowed, status] : {std::pair{"1e-30", 1}, std::pair{"0.999", 0}}) {
    std::ofstream(folder.file("allowed.toml"))
        << "[shortcuts.pair-cutoff]\nany = { relative = \"" << allowed << "\" }\n";
    const ProcessResult result = heraldgauge(
        {"ledger", "-", "--shortcut", "pair-cutoff=2", "--budget", folder.file("allowed.toml"), "--format", "json"},
        small_scenario());
    EXPECT_EQ(result.status, status) << result.err;
    EXPECT_EQ(json::parse(result.out)["breaches"].empty(), status == 0);
  }
}

TEST(LedgerCommand, NamesWhatItDoesNotKnow) {
  const ProcessResult result = heraldgauge({"ledger", "-", "--shortcut", "pair-cutof"}, small_scenario());
  EXPECT_EQ(result.status, 2);
  EXPECT_NE(result.err.find("pair-cutoff"), std::string::npos);
}

TEST(FrontierCommand, GivesABracket) {
  const ProcessResult result =
      heraldgauge({"frontier", "-", "--shortcut", "pair-cutoff=2", "--quantity", "herald_probability", "--error",
                   "0.01", "--over", "source.pair_parameter", "--from", "0.0001", "--to", "0.9", "--format", "json"},
                  small_scenario());
  ASSERT_EQ(result.status, 0) << result.err;
  EXPECT_EQ(schema_faults("frontier", result.out), "");
  const json bracket = json::parse(result.out);
  EXPECT_EQ(bracket["over"], "source.pair_parameter");
  EXPECT_LT(std::stod(bracket["inside"].get<std::string>()), std::stod(bracket["outside"].get<std::string>()));
}

TEST(ListCommand, KnowsShortcutsAndConventions) {
  const ProcessResult shortcuts = heraldgauge({"list", "shortcuts", "--format", "json"}, std::string());
  const ProcessResult conventions = heraldgauge({"list", "conventions", "--format", "json"}, std::string());
  EXPECT_GE(json::parse(shortcuts.out).size(), 22U);
  EXPECT_GE(json::parse(conventions.out).size(), 14U);
}

}  // namespace
}  // namespace heraldgauge::test
