#pragma once
// Values in binary64 for the search for causes: from the binary64 evaluator, and where that declines from an enclosure.

#include <vector>

#include "compare/departure.hpp"

namespace heraldgauge::compare {

// What a departure gives with a setting; one value a quantity, in the order asked.
std::vector<Value> values_of_departure(const Departure& departure, const Setting& setting, const Case& point,
                                       const std::vector<model::Quantity>& quantities);

// What the model gives.
std::vector<Value> values_of_model(const Case& point, const std::vector<model::Quantity>& quantities);

}  // namespace heraldgauge::compare
