#include "reference/model/pattern.hpp"

namespace heraldgauge::model {
namespace {

AcceptedOutcome exactly(StationDetector first, StationDetector second, bool minus) {
  AcceptedOutcome outcome{{}, minus};
  outcome.detectors.fill(Ask{Ask::Kind::silent});
  outcome.detectors[first] = outcome.detectors[second] = Ask{Ask::Kind::clicks};
  return outcome;
}

}  // namespace

std::vector<AcceptedOutcome> accepted_outcomes(Herald herald) {
  std::vector<AcceptedOutcome> outcomes;
  if (herald != Herald::psi_minus) outcomes.insert(outcomes.end(), {exactly(cH, cV, false), exactly(dH, dV, false)});
  if (herald != Herald::psi_plus) outcomes.insert(outcomes.end(), {exactly(cH, dV, true), exactly(cV, dH, true)});
  return outcomes;
}

}  // namespace heraldgauge::model
