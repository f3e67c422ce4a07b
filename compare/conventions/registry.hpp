#pragma once
// The registry of conventions: numbers that are meant in one way and used in another. To add one: a file in this folder
// that defines a function returning the Departure, and its name in the two lists of registry.cpp.

#include <string_view>
#include <vector>

#include "compare/departure.hpp"

namespace heraldgauge::compare {

const std::vector<Departure>& conventions();
const Departure* find_convention(std::string_view id);

}  // namespace heraldgauge::compare
