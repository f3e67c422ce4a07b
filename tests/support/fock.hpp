#pragma once
// Brute force in a truncated Fock space, in binary64: explicit amplitudes of loss, beam splitters and analysers between
// number states, no determinant and no generating function. Independent of both routes; slow and for small chains only.

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::test {

struct FockValue {
  double value;  // sum over all configurations with at most `pairs` pairs a source
  double tail;   // the true probability lies in [value, value + tail], up to rounding: sum_k P(n_k > pairs)
};

// The probability of a pattern as recorded, at the chain's own angles. Any source kind, detector kind, v and dark
// model; requires that no place has a shared background. Rounding: below 1e-12 of the herald probability for pairs
// <= 6.
FockValue fock_pattern_probability(const model::Chain& chain, const model::Pattern& pattern, int pairs);

}  // namespace heraldgauge::test
