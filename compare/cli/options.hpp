#pragma once
// The command line's text judged: names found, numbers read exactly, every fault reported.

#include <vector>

#include "compare/audit_command.hpp"
#include "compare/cli/arguments.hpp"
#include "compare/enclose_command.hpp"
#include "compare/frontier_command.hpp"
#include "compare/ledger_command.hpp"
#include "compare/list_command.hpp"
#include "compare/quick_command.hpp"
#include "reference/model/scenario.hpp"
#include "reports/writer.hpp"

namespace heraldgauge::cli {

// Everything that a command needs beside its scenario. Fields that belong to another command keep their defaults.
struct Options {
  reports::Format format = reports::Format::text;
  std::vector<model::Assignment> assignments;
  compare::EncloseOptions enclose;
  compare::QuickOptions quick;
  compare::AuditOptions audit;
  compare::LedgerOptions ledger;
  compare::FrontierOptions frontier;
  compare::ListSubject list_subject = compare::ListSubject::quantities;
};

model::Expected<Options> resolve_options(const Arguments& arguments);

}  // namespace heraldgauge::cli
