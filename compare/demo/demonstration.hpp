#pragma once
// The demonstration: certified values beside what a direct binary64 program gets from the same formula, and beside a
// published closed form.

#include "reference/model/scenario.hpp"
#include "reports/record/results.hpp"

namespace heraldgauge::compare {

// At each point of the scenario, for the quantities that it asks for (herald_probability and end patterns only), the
// certified value and the signed sum over silent subsets in binary64.
model::Expected<reports::ComparisonReport> against_subset_sum(const model::Scenario& scenario);

// The certified gain of a direct pair link and the gain of Ma, Fung and Lo, Phys. Rev. A 76, 012307 (2007).
model::Expected<reports::ComparisonReport> against_published_gain(const model::Scenario& scenario);

}  // namespace heraldgauge::compare
