#pragma once

#include <functional>
#include <optional>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference::closed_form {

// Encloses the place in [lower, upper] where a continuous monotone f changes its sign, by bisection with certain signs:
// f(lower) and f(upper) must have certain, opposite signs at `bits`. Ends where the sign at the middle is no longer
// certain, or after `bits` steps: the width is then about the uncertainty of f over its slope. None where the ends do
// not have such signs.
std::optional<Interval> sign_change(const std::function<Interval(const Interval&)>& f, const Rational& lower,
                                    const Rational& upper, Precision bits);

}  // namespace heraldgauge::reference::closed_form
