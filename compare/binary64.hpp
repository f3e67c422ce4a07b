#pragma once
// Exact numbers as the binary64 number that a program would start from.

#include "reference/model/real.hpp"

namespace heraldgauge::compare {

// The nearest binary64 number, up to one more rounding at 128 bits where x is irrational. Requires a result in range,
// as every probability and angle of a chain is.
double to_binary64(const model::Real& x);

}  // namespace heraldgauge::compare
