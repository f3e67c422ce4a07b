#pragma once
// The command `enclose`: certified values over the points of a scenario.

#include <optional>
#include <vector>

#include "reference/enclose.hpp"
#include "reference/model/scenario.hpp"
#include "reports/record/results.hpp"

namespace heraldgauge::compare {

struct EncloseOptions {
  std::vector<model::Quantity> quantities;  // empty: what the scenario asks for, else all that apply
  int digits = 30;
  reference::RouteChoice route = reference::RouteChoice::cheaper;
  bool exact = false;
  bool with_certificate = false;
  unsigned threads = 0;  // 0: as many as the machine has; the answer does not depend on it
};

struct EncloseAnswer {
  reports::EncloseReport report;
  std::optional<reports::CertificateReport> certificate;  // where asked for
  bool decided = true;                                    // no value is undecided
};

// Faults where a value of a point is out of range, or where the request cannot be served (see reference::enclose).
model::Expected<EncloseAnswer> enclose_command(const model::Scenario& scenario, const EncloseOptions& options);

}  // namespace heraldgauge::compare
