#pragma once
// Visibilities that depend on the mean pairs alone.

#include "compare/formula.hpp"

namespace heraldgauge::compare {

// The visibility of a link without a station, or with one, whose sources have these mean pairs per polarisation.
using VisibilityOfMeanPairs = reference::Interval (*)(const reference::Interval& mu, std::size_t stations);

// Completes a departure that gives visibility and visibility_deficit by such a formula, of the mean pairs averaged over
// the sources. Declined: ideal pairs, more than one station.
Departure by_mean_pairs(Departure departure, VisibilityOfMeanPairs visibility);

}  // namespace heraldgauge::compare
