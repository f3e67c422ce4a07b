#pragma once
// The determinant route's probabilities in either arithmetic: joint tables of the herald and the ends' clicks, the
// herald alone, one stated pattern.

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/optics/angles.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference {

// The analyser angles that a basis means for a chain.
EndAngles angles_of(const model::Chain& chain, Basis basis);

template <class Number>
EndTable<Number> joint_table(const Field<Number>& field, const model::Chain& chain, Basis basis);

template <class Number>
Number herald_probability(const Field<Number>& field, const model::Chain& chain);

// Nothing is corrected: the pattern as it is recorded, at the chain's own angles. Requires that no detector counts.
template <class Number>
Number pattern_probability(const Field<Number>& field, const model::Chain& chain, const model::Pattern& pattern);

}  // namespace heraldgauge::reference
