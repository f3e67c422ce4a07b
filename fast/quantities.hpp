#pragma once
// Quantities from probabilities.

#include <span>
#include <vector>

#include "fast/evaluate.hpp"
#include "fast/sums.hpp"

namespace heraldgauge::fast {

// Writes one value a quantity, in order; capacities come from the chain alone. Returns the largest part of any value
// that the cut-offs may have left out, relative.
double form_values(const model::Chain& chain, const Sums& sums, const std::vector<model::Quantity>& quantities,
                   std::span<Value> values);

// x * 2^exponent, normalised.
Scaled scaled(double x, long exponent);

}  // namespace heraldgauge::fast
