#include "reference/pair_number/angle.hpp"

#include "reference/optics/angles.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

// cos^2 = (1 + cos 2th)/2 where that is rational.
Interval squared_cosine(const model::Rational& degrees, Precision bits) {
  if (const auto doubled = rational_cosine(2 * degrees)) return {model::Rational((1 + *doubled) / 2), bits};
  return square(cosine_of_degrees(degrees, bits));
}

}  // namespace

SquaredDirection squared_direction(const model::Rational& degrees, Precision bits) {
  return {squared_cosine(degrees, bits), squared_cosine(degrees - 90, bits),
          sine_of_degrees(2 * degrees, bits) * Interval(model::Rational(1, 2), bits)};
}

bool is_right_angle_multiple(const model::Rational& degrees) {
  return rational_cosine(4 * degrees) == model::Rational(1);
}

}  // namespace heraldgauge::reference::pair_number
