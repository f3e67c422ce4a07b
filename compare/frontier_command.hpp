#pragma once
// The command `frontier`: how far a key can go before a shortcut leaves a relative error E.

#include "compare/chosen.hpp"
#include "reports/record/ledger.hpp"

namespace heraldgauge::compare {

struct FrontierAxis {
  std::string key;
  model::Rational from, to;  // from < to
};

struct FrontierOptions {
  std::string shortcut;  // "ID" or "ID=SETTING"
  model::Quantity quantity;
  model::Rational error;           // E > 0
  std::vector<FrontierAxis> axes;  // one: a bracket; two: a map
  long points = 100;               // of the map, along each axis, 2 or more
  unsigned threads = 0;
};

struct FrontierAnswer {
  reports::FrontierReport report;
  bool decided = true;  // false where no bracket could be certified
};

// One key: a certified bracket by bisection. `inside` is a value at which the error is certainly at most E, `outside`
// one at which it is certainly above; between them lies a crossing, and the two differ by at most 1e-6 of the range
// where the enclosures allow it. Where the whole range, as far as its two ends tell, is inside or outside, the other is
// absent. Two keys: a map, `within` certified at each point. Faults: unknown shortcut, keys that do not exist, a swept
// scenario, values out of range.
model::Expected<FrontierAnswer> frontier_command(const model::Scenario& scenario, const FrontierOptions& options);

}  // namespace heraldgauge::compare
