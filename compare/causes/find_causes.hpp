#pragma once
// Likely causes of the numbers that differ.

#include <string>
#include <vector>

#include "compare/audit/sample.hpp"
#include "reports/record/audit.hpp"

namespace heraldgauge::compare {

struct CausesFound {
  std::vector<reports::Cause> causes;  // best first
  std::string note;                    // why there are none, or what limits them
};

// Tries every registered shortcut and convention, alone and, where none explains all, in pairs, and some patterns.
// Nothing is named where every number agrees. Explanations that give the same numbers within the tolerances are one
// cause with the others as `same_as`.
CausesFound find_causes(const Sample& sample, const Subject& subject, unsigned threads);

}  // namespace heraldgauge::compare
