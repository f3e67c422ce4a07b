#pragma once
// Analyser angles: cosines and sines of exact degrees, exact where they are rational.

#include <optional>

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference {

// cos(degrees) where it is rational: 0, +-1/2, +-1 (Niven's theorem: no other rational angle has a rational cosine).
std::optional<Rational> rational_cosine(const Rational& degrees);

// Enclosures at every angle; exact where rational, and reduced to [0, 90] degrees before any rounding.
Interval cosine_of_degrees(const Rational& degrees, Precision bits);
Interval sine_of_degrees(const Rational& degrees, Precision bits);

// The analyser angles of both ends, in degrees.
struct EndAngles {
  Rational left_deg;
  Rational right_deg;
};

// The angles an evaluation may use: without stations only right - left matters, so the left one becomes 0.
EndAngles effective_angles(const model::Chain& chain, const EndAngles& angles);

// What the no-click determinant needs of two analyser angles.
template <class Number>
struct AngleFactors {
  Number cos_2left;
  Number cos_2right;
  Number sin_2left_sin_2right;
};

// True where all three factors are rational.
bool are_rational(const EndAngles& angles);

AngleFactors<Interval> angle_factors(const EndAngles& angles, const Field<Interval>& field);
AngleFactors<Rational> angle_factors(const EndAngles& angles, const Field<Rational>& field);  // requires are_rational

}  // namespace heraldgauge::reference
