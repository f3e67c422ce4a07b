#include "reference/optics/angles.hpp"

namespace heraldgauge::reference {
namespace {

using model::Integer;

const Rational full_turn = 360;

Rational reduced(const Rational& degrees) {  // to [0, 360)
  const Rational turns = degrees / full_turn;
  Integer whole;
  mpz_fdiv_q(whole.get_mpz_t(), turns.get_num_mpz_t(), turns.get_den_mpz_t());
  return degrees - whole * full_turn;
}

// cos on [0, 90] degrees; the sine of the complement where that is smaller, so that no digits are lost near 90.
Interval cosine_in_quadrant(const Rational& degrees, Precision bits) {
  const auto radians = [bits](const Rational& angle) { return Interval(Rational(angle / 180), bits) * pi(bits); };
  return degrees <= 45 ? cosine(radians(degrees)) : sine(radians(90 - degrees));
}

// sin a sin b = (cos(a - b) - cos(a + b)) / 2, the differences formed before any rounding.
std::optional<Rational> rational_sine_product(const Rational& a, const Rational& b) {
  if (rational_cosine(a - 90) == Rational(0) || rational_cosine(b - 90) == Rational(0)) return Rational(0);
  const auto difference = rational_cosine(a - b);
  const auto sum = rational_cosine(a + b);
  if (!difference || !sum) return std::nullopt;
  return Rational((*difference - *sum) / 2);
}

}  // namespace

std::optional<Rational> rational_cosine(const Rational& degrees) {
  const Rational angle = reduced(degrees);
  if (angle.get_den() != 1) return std::nullopt;
  switch (angle.get_num().get_si()) {
    case 0:
      return Rational(1);
    case 60:
    case 300:
      return Rational(1, 2);
    case 90:
    case 270:
      return Rational(0);
    case 120:
    case 240:
      return Rational(-1, 2);
    case 180:
      return Rational(-1);
    default:
      return std::nullopt;
  }
}

Interval cosine_of_degrees(const Rational& degrees, Precision bits) {
  if (const auto exact = rational_cosine(degrees)) return {*exact, bits};
  Rational angle = reduced(degrees);
  if (angle > 180) angle = full_turn - angle;
  return angle <= 90 ? cosine_in_quadrant(angle, bits) : -cosine_in_quadrant(180 - angle, bits);
}

Interval sine_of_degrees(const Rational& degrees, Precision bits) { return cosine_of_degrees(degrees - 90, bits); }

EndAngles effective_angles(const model::Chain& chain, const EndAngles& angles) {
  if (chain.station_count() > 0) return angles;
  return {0, angles.right_deg - angles.left_deg};
}

bool are_rational(const EndAngles& angles) {
  const Rational left = 2 * angles.left_deg;
  const Rational right = 2 * angles.right_deg;
  return rational_cosine(left) && rational_cosine(right) && rational_sine_product(left, right);
}

AngleFactors<Interval> angle_factors(const EndAngles& angles, const Field<Interval>& field) {
  const Rational left = 2 * angles.left_deg;
  const Rational right = 2 * angles.right_deg;
  const auto product = rational_sine_product(left, right);
  return {cosine_of_degrees(left, field.bits), cosine_of_degrees(right, field.bits),
          product ? field(*product) : sine_of_degrees(left, field.bits) * sine_of_degrees(right, field.bits)};
}

AngleFactors<Rational> angle_factors(const EndAngles& angles, const Field<Rational>&) {
  const Rational left = 2 * angles.left_deg;
  const Rational right = 2 * angles.right_deg;
  return {*rational_cosine(left), *rational_cosine(right), *rational_sine_product(left, right)};
}

}  // namespace heraldgauge::reference
