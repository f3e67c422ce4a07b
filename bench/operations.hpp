#pragma once
// How many operations the fast evaluator needs for one point, and how many the machine can do.

#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/quantity.hpp"

namespace heraldgauge::bench {

// Multiply-adds of a chain's first attempt, counted from its plan (fast/operation_count.hpp says which). Throws where
// the fast evaluator does not serve the chain.
double multiply_adds(const model::Chain& chain, const std::vector<model::Quantity>& quantities);

// Does `steps` rounds of multiply-adds that do not wait for each other, in the widest registers that the fast
// evaluator uses on this machine, multiplication and addition each rounded as there. Returns their number; `sink`
// receives the results.
double multiply_adds_at_peak(long steps, double& sink);

}  // namespace heraldgauge::bench
