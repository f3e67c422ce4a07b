#pragma once
// g(S): the probability that no dark event fires in a set S of detectors of one place.
//
//   g(S) = prod_{j in S} (1 - d_j) * (1 + b sum_{j in S} eta_j / (F M))^(-M)
//
// with F detectors at the place, b mean background photons in M thermal modes, eta_j the registering probability.

#include <span>

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference {

// `silent` holds one bit a detector, bit j for detectors[j].
template <class Number>
Number no_dark_event(const Field<Number>& field, std::span<const model::Detector> detectors,
                     const model::Background& background, unsigned silent);

}  // namespace heraldgauge::reference
