#pragma once
// Which probabilities are exactly zero.
//
// In a block of fixed pair numbers the photon number of every arm is definite, so loss with transmittance t weighs the
// cases "k of n photons survive" by C(n,k) t^k (1-t)^(n-k), and what follows in each case does not depend on t. All
// these contributions are probabilities. The block's probability therefore vanishes for one t in (0,1) exactly when it
// vanishes for every t in (0,1). The same holds for lam (weights of the blocks), for the efficiency and the dark
// probability of each detector (weights of the number of photons it registers), for v (weights of the number of photons
// in the orthogonal mode) and for a background's mean photon number. So every parameter strictly inside its range may
// be replaced by 1/2, and the question is answered in exact rationals, whatever irrational numbers the chain holds.

#include <optional>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference {

// The chain with each parameter replaced by 0, 1/2 or 1 (background photons by 0 or 1); angles stay.
model::Chain zero_pattern_of(const model::Chain& chain);

// True entries are certainly zero, false ones certainly not. Nothing where the angles have irrational cosines or the
// chain has too many terms for exact arithmetic.
std::optional<EndTable<bool>> exact_zeros(const model::Chain& chain, Basis basis);
std::optional<bool> is_exactly_zero_herald(const model::Chain& chain);
std::optional<bool> is_exactly_zero_pattern(const model::Chain& chain, const model::Pattern& pattern);

// The same for left plus and right plus clicking with both cross detectors silent, at a given right analyser angle.
std::optional<bool> is_exactly_zero_coincidence(const model::Chain& chain, const model::Rational& right_deg);

// True only if that coincidence is certainly zero at every right angle: no photon ever reaches the right plus detector,
// at 0 or at 90 degrees, together with the herald and the left clicks, and it never fires by itself.
bool is_zero_at_every_angle(const model::Chain& chain);

}  // namespace heraldgauge::reference
