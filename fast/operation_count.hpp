#pragma once
// How much arithmetic a plan asks for.

#include "fast/plan.hpp"

namespace heraldgauge::fast {

// Multiplications that are followed by an addition, for one point: products with the stations' operators (for what is
// kept and for the bound on what is not), elements of the ends, contractions. Left out are the stations' elements and
// what forms quantities from sums: a tenth of the time.
double multiply_adds(const Plan& plan);

}  // namespace heraldgauge::fast
