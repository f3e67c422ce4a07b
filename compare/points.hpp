#pragma once
// What every command over a scenario starts from: the quantities to give and the chain at each point of the sweeps.

#include <vector>

#include "reference/model/scenario.hpp"
#include "reports/record/results.hpp"

namespace heraldgauge::compare {

// The quantities of the command line where there are any, else those the scenario asks for, else all that apply to it;
// the last without the irrational ones where only rationals can be served. Never empty.
std::vector<model::Quantity> quantities_to_give(const std::vector<model::Quantity>& asked,
                                                const model::Scenario& scenario, bool rational_only);

// The chains at the points first .. first + count - 1, or every distinct fault among them.
model::Expected<std::vector<model::Chain>> chains_at(const model::Scenario& scenario, std::uint64_t first,
                                                     std::size_t count, unsigned threads);

// The swept keys and their values at a point, as printed.
reports::Parameters parameters_at(const model::Scenario& scenario, std::uint64_t index);

// The faults without repetitions, in order: a fault that every point of a sweep has is one fault to the user.
model::Faults distinct(const model::Faults& faults);

}  // namespace heraldgauge::compare
