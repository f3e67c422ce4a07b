#pragma once

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference {

// Binary entropy h2(x) = -x log2 x - (1-x) log2(1-x) in bits, h2(0) = h2(1) = 0, of a probability: what of x lies in
// [0,1] counts, and something must. Encloses exactly the range over x up to the rounding of the two ends (a few units
// of the last place, relative also near 0 and 1), because h2 rises up to 1/2 and falls from there. Standard definition.
Interval binary_entropy(const Interval& x);

}  // namespace heraldgauge::reference
