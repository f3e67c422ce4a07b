#pragma once
// A click pattern over all detectors of a chain: what each detector must do for the pattern to count.

#include <array>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/fault.hpp"

namespace heraldgauge::model {

// What a pattern asks of one detector.
struct Ask {
  enum class Kind { not_looked_at, silent, clicks, counts } kind = Kind::not_looked_at;
  int photons = 0;  // for counts: exactly this many registered by a resolving detector
  friend bool operator==(const Ask&, const Ask&) = default;
};

struct Pattern {
  std::vector<std::array<Ask, 4>> stations;  // one a station, in the order cH, cV, dH, dV
  std::array<Ask, 2> left;                   // plus, cross
  std::array<Ask, 2> right;
  friend bool operator==(const Pattern&, const Pattern&) = default;
};

// The station patterns that a herald accepts: psi+ = {cH,cV} or {dH,dV}, psi- = {cH,dV} or {cV,dH}, all other detectors
// silent. `minus` tells a psi- outcome, after which V changes its sign at the right end.
struct AcceptedOutcome {
  std::array<Ask, 4> detectors;
  bool minus;
};
std::vector<AcceptedOutcome> accepted_outcomes(Herald herald);

}  // namespace heraldgauge::model
