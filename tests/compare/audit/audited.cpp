#include "tests/compare/audit/audited.hpp"

#include <stdexcept>

namespace heraldgauge::test {
namespace {

std::string lines_of(const model::Faults& faults) {
  std::string lines;
  for (const model::Fault& fault : faults) lines += model::describe(fault) + "\n";
  return lines;
}

model::Scenario scenario_of(const std::string& text) {
  auto scenario = model::read_scenario(text, "link.toml");
  if (!scenario) throw std::runtime_error(lines_of(scenario.faults()) + text);
  return std::move(scenario.value());
}

}  // namespace

std::vector<std::string> Audited::verdicts() const {
  std::vector<std::string> verdicts;
  for (const reports::AuditPoint& point : points) {
    for (const reports::AuditResult& result : point.results) verdicts.push_back(result.verdict);
  }
  return verdicts;
}

Audited audited(const std::string& scenario_text, const std::string& table, const compare::AuditOptions& options) {
  const model::Scenario scenario = scenario_of(scenario_text);
  Audited result;
  auto answer = compare::audit_command(scenario, compare::bytes_of(table), "table", options,
                                       [&](const reports::AuditPoint& point) { result.points.push_back(point); });
  if (!answer) throw std::runtime_error(lines_of(answer.faults()) + table);
  result.answer = std::move(answer.value());
  return result;
}

std::string audit_faults(const std::string& scenario_text, const std::string& table,
                         const compare::AuditOptions& options) {
  const model::Scenario scenario = scenario_of(scenario_text);
  const auto answer =
      compare::audit_command(scenario, compare::bytes_of(table), "table", options, [](const reports::AuditPoint&) {});
  return answer ? "" : lines_of(answer.faults());
}

}  // namespace heraldgauge::test
