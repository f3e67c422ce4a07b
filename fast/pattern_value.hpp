#pragma once
// The probability of a free click pattern.

#include "fast/evaluate.hpp"
#include "fast/modes.hpp"

namespace heraldgauge::fast {

// Computed in double-double, since terms of either sign may cancel; the bound comes from the sizes of all terms. Starts
// from the given cut-offs. Declined where the pattern counts photons, or where the terms cancel beyond double-double.
Value pattern_value(const ChainNumbers& numbers, const ExactModes& modes, std::vector<int> cutoffs,
                    const model::Pattern& pattern, double unit, double tail_allowed);

}  // namespace heraldgauge::fast
