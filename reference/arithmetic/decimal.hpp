#pragma once
// Exact numbers as decimals rounded in a stated direction: the only way a bound becomes text.

#include <string>

#include "reference/model/rational.hpp"

namespace heraldgauge::reference {

enum class Direction { down, up, nearest };  // toward -infinity, toward +infinity, ties to even

// x with `digits` significant decimal digits (>= 1), trailing zeros dropped: "0.00125", "1.25e-9", "0". Down never lies
// above x, up never below; nearest is the closest such decimal.
std::string decimal(const model::Rational& x, int digits, Direction direction);

// floor(log10 |x|) for x != 0.
long decimal_exponent(const model::Rational& x);

}  // namespace heraldgauge::reference
