#pragma once
// The registry of shortcuts: approximations and ways of computing that people use in place of the exact values. To add
// one: a file in this folder that defines a function returning the Departure, and its name in the two lists of
// registry.cpp.

#include <string_view>
#include <vector>

#include "compare/departure.hpp"

namespace heraldgauge::compare {

const std::vector<Departure>& shortcuts();
const Departure* find_shortcut(std::string_view id);

}  // namespace heraldgauge::compare
