#pragma once
// Quantities from probabilities.

#include <vector>

#include "fast/evaluate.hpp"
#include "fast/sums.hpp"

namespace heraldgauge::fast {

// One value a quantity, in order; capacities come from the chain alone. `tail_share` is the largest part of any value
// that its cut-offs may have left out, relative.
struct Formed {
  std::vector<Value> values;
  double tail_share = 0;
  double worst_bound = 0;
};
Formed form_values(const model::Chain& chain, const Sums& sums, const std::vector<model::Quantity>& quantities);

// A capacity of the loss alone, in bits per mode.
Value capacity(const model::Chain& chain, const model::Quantity& quantity);
bool is_capacity(model::QuantityKind kind);

// x * 2^exponent, normalised.
Scaled scaled(double x, long exponent);

}  // namespace heraldgauge::fast
