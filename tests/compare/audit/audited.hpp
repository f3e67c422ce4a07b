#pragma once
// An audit run in memory.

#include <string>
#include <vector>

#include "compare/audit_command.hpp"

namespace heraldgauge::test {

struct Audited {
  compare::AuditAnswer answer;
  std::vector<reports::AuditPoint> points;

  // Verdicts in the order of the table.
  std::vector<std::string> verdicts() const;
};

// Throws where the scenario or the table is at fault.
Audited audited(const std::string& scenario, const std::string& table, const compare::AuditOptions& options = {});

// The lines that describe the faults; empty where there are none.
std::string audit_faults(const std::string& scenario, const std::string& table,
                         const compare::AuditOptions& options = {});

}  // namespace heraldgauge::test
