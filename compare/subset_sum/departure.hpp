#pragma once
// The subset sum in a machine arithmetic as a departure: what a direct program returns is the value.

#include "compare/departure.hpp"
#include "compare/subset_sum/subset_sum.hpp"

namespace heraldgauge::compare {

// Completes a departure whose values are formed from a subset sum. Its error is certified as it stands.
Departure by_subset_sum(Departure departure, model::Expected<SubsetSum> (*sum)(const model::Chain&));

}  // namespace heraldgauge::compare
