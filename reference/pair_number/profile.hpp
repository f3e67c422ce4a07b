#pragma once
// The probability of "plus clicks, cross silent" at both ends as a finite Fourier sum in phi = 2 * right analyser
// angle.

#include "reference/pair_number/heralded_chain.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference::pair_number {

// As many harmonics as the last source keeps pairs; no remainder besides the tail.
AngularProfile pair_number_profile(const HeraldedChain& link, const Accuracy& accuracy);

}  // namespace heraldgauge::reference::pair_number
