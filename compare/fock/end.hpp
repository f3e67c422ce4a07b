#pragma once
// A measured end by explicit Fock matrices: analyser, loss, two detectors with any photon-number response.
//
// H = x p - y c, V = y p + x c in creation operators of the plus and cross modes, (x, y) along (cos th, sin th). The
// loss is the same for both, so it is put behind the analyser, in front of each detector.

#include <vector>

#include "compare/fock/arithmetic.hpp"
#include "compare/fock/matrix.hpp"
#include "compare/fock/response.hpp"

namespace heraldgauge::compare::fock {

// The direction of an analyser, not normalised: exact in every arithmetic at multiples of 45 degrees.
template <class Number>
struct Direction {
  Number x, y;
  Number inverse_norm;  // 1/(x^2 + y^2)
};
template <class Number>
Direction<Number> direction(const Arithmetic<Number>& number, const Rational& degrees);

// An arm: t and 1-t, each rounded from the exact number.
template <class Number>
struct Loss {
  Loss(const Arithmetic<Number>& number, const model::Real& transmittance)
      : kept(number(transmittance)), lost(number(model::Real(1) - transmittance)) {}
  Number kept, lost;
};

// f~(n) = sum_k C(n,k) t^k (1-t)^(n-k) f(k).
template <class Number>
std::vector<Number> behind_loss(const Arithmetic<Number>& number, const Loss<Number>& loss,
                                const std::vector<Number>& response);

// Element (a, b) of sector D: a + D ket, a bra photons in H, b ket, b + D bra photons in V, a + b + D <= cut; without
// the roots of factorials. Responses behind the loss, for up to `cut` photons.
template <class Number>
Sectors<Number> end_part(const Arithmetic<Number>& number, const Direction<Number>& direction,
                         const std::vector<Number>& plus, const std::vector<Number>& cross, long cut, long sectors);

}  // namespace heraldgauge::compare::fock
