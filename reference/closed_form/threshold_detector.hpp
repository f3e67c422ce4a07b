#pragma once

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference::closed_form {

// P(no click | n photons arrive) of a threshold detector of efficiency eta and dark probability d, both in [0,1]:
// independent dark counts (1-d)(1-eta)^n, or thermal noise in the detected mode (1-d)(1-eta(1-d))^n. The second: Rohde
// and Ralph, J. Mod. Opt. 53, 1589 (2006); scope of the paper read in its abstract, formula and attribution from
// memory, verified by a beam splitter and a thermal state. For n = 1 they differ by eta d (1-d), the thermal one clicks
// less.
template <class Number>
Number silent_probability(const Field<Number>& field, model::DarkModel dark_model, const Number& eta, const Number& d,
                          unsigned n);

}  // namespace heraldgauge::reference::closed_form
