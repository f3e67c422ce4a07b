// Blind trials: tables with planted causes, and clean ones. HERALDGAUGE_TEST_EFFORT=20 runs the whole of them: 200
// tables with one cause, 100 with two, 400 clean.

#include <gtest/gtest.h>

#include <algorithm>
#include <iostream>
#include <optional>

#include "tests/compare/audit/audited.hpp"
#include "tests/compare/audit/blind_tables.hpp"

namespace heraldgauge::test {
namespace {

// Whether a cause, or one that is the same on this table, has the id.
bool names(const reports::Cause& cause, const std::string& id) {
  const auto mentions = [&](const std::string& name) {
    return (" " + name + " ").find(" " + id + " ") != std::string::npos;
  };
  return cause.cause == id || std::any_of(cause.same_as.begin(), cause.same_as.end(), mentions);
}

// Nothing where it is not named at all.
std::optional<std::size_t> rank_of(const std::vector<reports::Cause>& causes, const std::string& id) {
  const auto found =
      std::find_if(causes.begin(), causes.end(), [&](const reports::Cause& cause) { return names(cause, id); });
  if (found == causes.end()) return std::nullopt;
  return static_cast<std::size_t>(found - causes.begin());
}

std::string shown(const std::vector<reports::Cause>& causes) {
  std::string line;
  for (const reports::Cause& cause : causes) {
    line += cause.cause + (cause.setting ? "(" + *cause.setting + ")" : "") + " " + cause.explains + " [";
    for (const std::string& other : cause.same_as) line += other + "; ";
    line += "] ";
  }
  return line;
}

void tell_missed(int number, const BlindTable& table, const std::vector<reports::Cause>& causes) {
  std::cout << "table " << number << ", planted " << table.note << ": " << shown(causes) << std::endl;
}

TEST(Blind, OnePlantedCauseComesFirst) {
  int tables = 0, first = 0, among_three = 0;
  for_each_case(10, 31, [&](Random& random) {
    const BlindTable table = table_with_one(random);
    const Audited result = audited(table.scenario, table.csv);
    const auto rank = rank_of(result.answer.conclusion.causes, table.planted[0]);
    first += rank == 0U ? 1 : 0;
    among_three += rank && *rank < 3 ? 1 : 0;
    if (rank != 0U) tell_missed(tables, table, result.answer.conclusion.causes);
    ++tables;
  });
  std::cout << "first " << first << ", among three " << among_three << " of " << tables << "\n";
  EXPECT_GE(first, tables * 95 / 100);
  EXPECT_GE(among_three, tables * 99 / 100);
}

TEST(Blind, TwoPlantedCausesAreBothNamed) {
  int tables = 0, both = 0;
  for_each_case(5, 32, [&](Random& random) {
    const BlindTable table = table_with_two(random);
    const std::vector<reports::Cause> causes = audited(table.scenario, table.csv).answer.conclusion.causes;
    const bool named = rank_of(causes, table.planted[0]) && rank_of(causes, table.planted[1]);
    both += named ? 1 : 0;
    if (!named) tell_missed(tables, table, causes);
    ++tables;
  });
  std::cout << "both named " << both << " of " << tables << "\n";
  EXPECT_GE(both, tables * 70 / 100);
}

TEST(Blind, CleanTablesAreNotAccused) {
  for_each_case(20, 33, [&](Random& random) {
    const BlindTable table = clean_table(random, random() % 2 == 0 ? Evaluator::reference : Evaluator::fast);
    const Audited result = audited(table.scenario, table.csv);
    const reports::AuditSummary& summary = result.answer.conclusion.summary;
    EXPECT_EQ(summary.counts.agrees, summary.counts.all()) << table.scenario << table.csv;
    EXPECT_TRUE(result.answer.conclusion.causes.empty()) << table.scenario << table.csv;
  });
}

}  // namespace
}  // namespace heraldgauge::test
