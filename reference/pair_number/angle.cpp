#include "reference/pair_number/angle.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Integer;
using model::Rational;

// degrees modulo `period`, in [0, period).
Rational reduced(const Rational& degrees, const Rational& period) {
  const Rational turns = degrees / period;
  Integer whole;
  mpz_fdiv_q(whole.get_mpz_t(), turns.get_num_mpz_t(), turns.get_den_mpz_t());
  return degrees - Rational(whole) * period;
}

// sin of an angle in [0, 90] degrees; near 90 from the cosine of what is missing.
Interval sine_in_first_quadrant(const Rational& degrees, Precision bits) {
  if (degrees == 0) return {0L, bits};
  if (degrees == 30) return {Rational(1, 2), bits};
  if (degrees == 90) return {1L, bits};
  const bool beyond = degrees > 45;
  const Interval radians = Interval(beyond ? Rational(90 - degrees) : degrees, bits) * pi(bits) / Interval(180L, bits);
  return beyond ? cosine(radians) : sine(radians);
}

Interval sine_of_degrees(const Rational& degrees, Precision bits) {
  const Rational turn = reduced(degrees, 360);
  const Rational half = turn < 180 ? turn : Rational(turn - 180);
  const Interval size = sine_in_first_quadrant(half <= 90 ? half : Rational(180 - half), bits);
  return turn < 180 ? size : -size;
}

Interval squared_sine(const Rational& degrees, Precision bits) {
  const Rational half_turn = reduced(degrees, 180);
  if (half_turn == 45 || half_turn == 135) return {Rational(1, 2), bits};
  if (half_turn == 60 || half_turn == 120) return {Rational(3, 4), bits};
  return square(sine_of_degrees(half_turn, bits));
}

}  // namespace

SquaredDirection squared_direction(const Rational& degrees, Precision bits) {
  return {squared_sine(degrees + 90, bits), squared_sine(degrees, bits),
          sine_of_degrees(2 * degrees, bits) * Interval(Rational(1, 2), bits)};
}

bool is_right_angle_multiple(const Rational& degrees) { return reduced(degrees, 90) == 0; }

}  // namespace heraldgauge::reference::pair_number
