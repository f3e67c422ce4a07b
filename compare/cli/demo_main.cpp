// The demonstration that the quickstart runs: two scenarios, each compared and printed.

#include <exception>

#include "compare/cli/exit_status.hpp"
#include "compare/cli/input.hpp"
#include "compare/cli/output.hpp"
#include "compare/demo/demonstration.hpp"
#include "reports/writer.hpp"

namespace {

using heraldgauge::cli::ExitStatus;
using heraldgauge::model::Expected;
using heraldgauge::model::Scenario;
using heraldgauge::reports::ComparisonReport;

// Digits to which a published formula that means the same thing must agree with the certified value.
constexpr int expected_digits = 29;

Expected<Scenario> scenario_in(const std::string& file) {
  const auto text = heraldgauge::cli::read_input(file);
  if (!text) return text.faults();
  return heraldgauge::model::read_scenario(*text, file);
}

Expected<ComparisonReport> comparison(const std::string& file,
                                      Expected<ComparisonReport> (*compare)(const Scenario& scenario)) {
  const auto scenario = scenario_in(file);
  if (!scenario) return scenario.faults();
  return compare(*scenario);
}

ExitStatus print(const std::string& heading, const Expected<ComparisonReport>& report) {
  if (!report) {
    for (const auto& fault : report.faults()) heraldgauge::cli::write_message(heraldgauge::model::describe(fault));
    return ExitStatus::fault;
  }
  const std::string text = heading + heraldgauge::reports::write(*report, heraldgauge::reports::Format::text,
                                                                 {heraldgauge::cli::terminal_columns()});
  const std::string failure = heraldgauge::cli::write_output("-", text + "\n");
  if (failure.empty()) return ExitStatus::done;
  heraldgauge::cli::write_message(failure);
  return ExitStatus::machine;
}

ExitStatus demonstrate(const std::string& line_file, const std::string& direct_file) {
  const auto sums = comparison(line_file, heraldgauge::compare::against_subset_sum);
  const auto gains = comparison(direct_file, heraldgauge::compare::against_published_gain);
  ExitStatus status = print(
      "1. The exact formula, certified, and the same formula summed in binary64 (signed sum over silent detectors).\n"
      "   digits_left: how many significant digits of the binary64 value are right.\n\n",
      sums);
  status =
      graver(status, print("2. A published closed form: gain of a direct pair link, X. Ma, C.-H. F. Fung, H.-K. Lo,\n"
                           "   Phys. Rev. A 76, 012307 (2007), formula from memory.\n\n",
                           gains));
  const bool agrees = gains && gains->points.front().results.front().digits_left >= expected_digits;
  return agrees ? status : graver(status, ExitStatus::found);
}

}  // namespace

int main(int count, char** values) {
  if (count != 3) {
    heraldgauge::cli::write_message("heraldgauge_demo: expected two scenarios: a line with stations, a direct link");
    return static_cast<int>(ExitStatus::fault);
  }
  try {
    return static_cast<int>(demonstrate(values[1], values[2]));
  } catch (const std::exception& failure) {
    heraldgauge::cli::write_message(std::string("heraldgauge_demo: ") + failure.what());
    return static_cast<int>(ExitStatus::machine);
  }
}
