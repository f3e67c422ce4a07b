#pragma once
// A station's click patterns as a signed sum over sets of silent detectors (inclusion-exclusion),
//
//   P(C click, Z silent) = sum_{S subset of C} (-1)^|S| G(S u Z),
//
// with equal terms merged: detectors that are alike make many of them equal.

#include <array>
#include <cstddef>
#include <vector>

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::reference {

// One pattern of a station with its weight in the sum. `reverses_v` reverses the sign of V behind the station, as the
// correction after psi- does: in the determinant it reverses the sign of kappa.
struct WeightedPattern {
  std::array<model::Ask, 4> detectors;  // clicks, silent or not looked at
  int weight = 1;
  bool reverses_v = false;
};

// How the outcomes of the stations enter.
enum class HeraldSum {
  corrected,   // all accepted outcomes, V reversed after each psi-
  plain,       // all accepted outcomes, nothing corrected: O = O(psi+) + O(psi-)
  alternating  // psi- counted negative: O' = O(psi+) - O(psi-)
};
std::vector<WeightedPattern> weighted_outcomes(model::Herald herald, HeraldSum sum);

// The block of one polarisation for a set of silent detectors: R element, L element and determinant of
//   [[1 - (eta_c + eta_d) t_R/2, x], [x, 1 - (eta_c + eta_d) t_L/2]],  x^2 = (eta_c - eta_d)^2 t_R t_L v / 4,
// eta_c, eta_d the registering probabilities of the silent ones, 0 for the others.
template <class Number>
struct StationBlock {
  Number r, l, determinant;
};

template <class Number>
struct StationTerm {
  std::size_t h, v;    // indices into h_blocks, v_blocks
  Number coefficient;  // signed, with the dark-event factor g(S)
  Number kappa;        // product of the off-diagonals x_H x_V
};

template <class Number>
struct StationTerms {
  std::vector<StationBlock<Number>> h_blocks, v_blocks;
  std::vector<StationTerm<Number>> terms;
};

template <class Number>
StationTerms<Number> station_terms(const Field<Number>& field, const model::Station& station,
                                   const model::Arm& right_arm_before, const model::Arm& left_arm_behind,
                                   const std::vector<WeightedPattern>& patterns);

// The number of merged terms, without computing any.
std::size_t count_station_terms(const model::Station& station, const std::vector<WeightedPattern>& patterns);

}  // namespace heraldgauge::reference
