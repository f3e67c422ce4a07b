#pragma once
// The determinant route: every probability as a finite signed sum of no-click determinants. Exact without any cut-off
// for squeezed sources and threshold detectors; the cost grows as the number of merged silent sets, 4^N where a
// station's detectors are alike, up to 9^N where not.

#include <memory>
#include <optional>
#include <string>

#include "reference/route.hpp"

namespace heraldgauge::reference {

std::unique_ptr<Route> make_determinant_route(const model::Chain& chain);

// Why the route cannot serve a chain: "an ideal-pair source (source 2)", "a number-resolving detector (station 1)".
std::optional<std::string> determinant_refusal(const model::Chain& chain);

// Terms of the signed sum over the stations, for the herald's accepted outcomes.
double determinant_terms(const model::Chain& chain);

}  // namespace heraldgauge::reference
