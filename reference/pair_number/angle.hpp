#pragma once
// The direction of an analyser at an exactly known angle in degrees.

#include "reference/arithmetic/interval.hpp"
#include "reference/model/rational.hpp"

namespace heraldgauge::reference::pair_number {

// cos^2, sin^2 and cos sin of one angle, exact where they are rational. The squares keep their relative precision where
// they are small.
struct SquaredDirection {
  Interval cosine_squared;
  Interval sine_squared;
  Interval product;  // cos sin
};
SquaredDirection squared_direction(const model::Rational& degrees, Precision bits);

// True exactly at multiples of 90 degrees, where an analyser keeps H and V apart.
bool is_right_angle_multiple(const model::Rational& degrees);

}  // namespace heraldgauge::reference::pair_number
