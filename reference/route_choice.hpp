#pragma once
// Which route serves a request, and at what predicted cost.

#include <memory>

#include "reference/enclose.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference {

enum class RouteName { determinant, pair_number };

// The forced route, or the cheaper of those that can serve. A fault names what the route cannot serve, or that its
// predicted cost is beyond reach.
model::Expected<RouteName> choose_route(const model::Chain& chain, const Request& request);

std::unique_ptr<Route> make_route(RouteName name, const model::Chain& chain);

// Where a route's first evaluation begins: bits for the digits, and for pair numbers a tail as far below the likely
// herald probability.
Accuracy aimed_accuracy(const model::Chain& chain, RouteName route, int digits);

// Bits of all exact inputs of a chain together: a measure of how long its rationals grow.
std::size_t input_bits(const model::Chain& chain);

}  // namespace heraldgauge::reference
