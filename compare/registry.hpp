#pragma once
// The shortcuts (approximations and ways of computing that people use in place of the exact values) and the conventions
// (numbers that are meant in one way and used in another).
//
// Each is a file of its own: compare/shortcuts/linear_loss.cpp defines `Departure linear_loss()`, whose id is
// "linear-loss". The build makes both lists from the names of the files, in alphabetical order (registry.cpp.in).

#include <string_view>
#include <vector>

#include "compare/departure.hpp"

namespace heraldgauge::compare {

const std::vector<Departure>& shortcuts();
const std::vector<Departure>& conventions();

// The shortcut or convention with an id; null where there is none.
const Departure* find_departure(std::string_view id);

}  // namespace heraldgauge::compare
