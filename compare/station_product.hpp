#pragma once
// A chain treated as independent chains of one station each.

#include "compare/formula.hpp"

namespace heraldgauge::compare {

// The product over the stations of a quantity of the chain made of that station, its two sources and their arms, ends
// as they are; of 1 minus that quantity where `complement` is set. 1 without stations.
Term product_over_stations(const Case& point, model::QuantityKind kind, Terms& terms, bool complement);

}  // namespace heraldgauge::compare
