#pragma once
// The probability of "plus clicks, cross silent" at both ends as a finite Fourier sum in phi = 2 * right analyser angle.

#include <memory>

#include "reference/pair_number/heralded_chain.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference::pair_number {

std::unique_ptr<AngularProfile> make_profile(const HeraldedChain& link, const Accuracy& accuracy);

}  // namespace heraldgauge::reference::pair_number
