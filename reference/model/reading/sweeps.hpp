#pragma once
// [[sweep]] tables as sweeps.

#include "reference/model/reading/items.hpp"

namespace heraldgauge::model::reading {

// Reads every sweep; those at fault are reported, and left out. The product of all may hold 10^7 points.
std::vector<Sweep> read_sweeps(const Items& items, InputMeaning inputs, Collector& faults);

}  // namespace heraldgauge::model::reading
