#pragma once
// The block of one end for a set of silent detectors,
//
//   [[A, C], [C, B]] = 1 - sum eta t r r^T,  r = (cos th, sin th) for plus, (-sin th, cos th) for cross:
//   A, B = 1 - (p + c)/2 -+ (p - c)/2 cos 2th,  C = -(p - c)/2 sin 2th,  A B - C^2 = (1 - p)(1 - c),
//
// p and c the products eta t of the silent plus and cross detectors, 0 for the others.

#include <array>

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference {

inline constexpr unsigned plus_bit = 2;  // index of an end's clicks or silent set: 2 * plus + cross
inline constexpr unsigned cross_bit = 1;

template <class Number>
struct EndBlock {
  Number centre;           // 1 - (p + c)/2
  Number half_difference;  // (p - c)/2
  Number determinant;      // (1 - p)(1 - c)
  Number dark;             // g of the silent set
};

template <class Number>
EndBlock<Number> end_block(const Field<Number>& field, const model::End& end, const model::Arm& arm, unsigned silent);

// The joint probabilities of exact clicks from those of silent sets, for both ends at once (inclusion-exclusion):
// result[a][b] = sum_{S subset a, T subset b} (-1)^(|S|+|T|) silent[~a u S][~b u T].
template <class Number>
std::array<std::array<Number, 4>, 4> exact_clicks(const std::array<std::array<Number, 4>, 4>& silent);

}  // namespace heraldgauge::reference
