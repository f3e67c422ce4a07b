#pragma once
// The command `audit`, from arguments to exit status.

#include "compare/audit_command.hpp"
#include "compare/cli/arguments.hpp"
#include "compare/cli/exit_status.hpp"
#include "reports/writer.hpp"

namespace heraldgauge::cli {

// The rule that the options state, or every fault in them.
model::Expected<compare::Rule> rule_of(const AuditArguments& arguments);

struct AuditRun {
  std::string results;  // a file, or "-"
  std::string output;   // likewise
  std::optional<std::string> ci_results;
  reports::Format format = reports::Format::text;
  compare::AuditOptions options;
};

ExitStatus run_audit(const AuditRun& run, const model::Scenario& scenario);

}  // namespace heraldgauge::cli
