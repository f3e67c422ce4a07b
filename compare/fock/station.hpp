#pragma once
// One polarisation of a station by explicit Fock matrices: loss in both arms, the part of L in an orthogonal temporal
// mode, the 50:50 beam splitter, and two detectors with any photon-number response.
//
// A state of i photons on the arm R and j on L is written by creation operators, R^i L^j, without 1/sqrt(i! j!): those
// roots are collected at the sources (transfer.hpp), where they meet in pairs. Lost and orthogonal photons are the same
// in bra and ket, so a transmittance t takes n+D ket and n bra photons to m+D and m with
//   T_D(n, m; t) = (n-m)! (1-t)^(n-m) C(n+D, n-m) C(n, n-m) t^m,
// and R^p L^q = 2^(-(p+q)/2) (c+d)^p (c-d)^q = 2^(-(p+q)/2) sum_x K(p,q,x) c^x d^(p+q-x), K integers.

#include <vector>

#include "compare/fock/arithmetic.hpp"
#include "compare/fock/matrix.hpp"

namespace heraldgauge::compare::fock {

struct StationShape {
  model::Real right_transmittance;  // of the arm R that arrives from the source before
  model::Real left_transmittance;   // of the arm L of the source behind
  model::Real indistinguishability;
  long right_cut, left_cut;  // pairs kept by the source before and behind
  long sectors;
};

// Element (a, b) of sector D takes R: a + D ket, a bra photons and L: b ket, b + D bra photons. Left out, because H and
// V have it both: (t_R t_L v)^(D/2). Responses of c and d for up to right_cut + left_cut photons.
template <class Number>
Sectors<Number> station_part(const Arithmetic<Number>& number, const StationShape& shape, const std::vector<Number>& c,
                             const std::vector<Number>& d);

// K(p, q, x) for p <= first, q <= second: table[p][q][x].
template <class Number>
std::vector<std::vector<std::vector<Number>>> beam_splitter_numbers(const Arithmetic<Number>& number, long first,
                                                                    long second);

}  // namespace heraldgauge::compare::fock
