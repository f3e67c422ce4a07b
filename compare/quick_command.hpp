#pragma once
// The command `quick`: values of the binary64 evaluator over the points of a scenario, each with a bound on its error.

#include <vector>

#include "reference/model/scenario.hpp"
#include "reports/record/results.hpp"

namespace heraldgauge::compare {

struct QuickOptions {
  std::vector<model::Quantity> quantities;  // empty: what the scenario asks for, else all that apply
  unsigned threads = 0;                     // 0: as many as the machine has; the answer does not depend on it
};

struct QuickAnswer {
  reports::QuickReport report;
  bool complete = true;  // the evaluator declined nothing
};

// Faults where a value of a point is out of range.
model::Expected<QuickAnswer> quick_command(const model::Scenario& scenario, const QuickOptions& options);

}  // namespace heraldgauge::compare
