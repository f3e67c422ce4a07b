#pragma once
// The command `ledger`: what each shortcut costs over the points of a scenario.

#include "compare/budget.hpp"
#include "compare/chosen.hpp"
#include "reports/record/ledger.hpp"

namespace heraldgauge::compare {

struct LedgerOptions {
  std::vector<model::Quantity> quantities;  // empty: what the scenario asks for, else all that apply
  std::vector<std::string> shortcuts;       // "ID" or "ID=SETTING"; empty: all, with their standard settings
  std::optional<Budget> budget;
  unsigned threads = 0;
};

// Faults where a value of a point is out of range, or a shortcut is unknown. Rows outside the budget are in `breaches`;
// a row whose error cannot be certified to be within its limit counts as outside.
model::Expected<reports::LedgerReport> ledger_command(const model::Scenario& scenario, const LedgerOptions& options);

}  // namespace heraldgauge::compare
