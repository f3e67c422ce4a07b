#include "reference/determinant/silent_sums.hpp"

namespace heraldgauge::reference {
namespace {

// Adds one leaf to all sums; keeps the intermediate matrices between calls so that nothing is allocated.
template <class Number>
class Accumulator {
 public:
  Accumulator(const Ring<Number>& ring, const std::vector<EndBlock<Number>>& left,
              const std::vector<EndBlock<Number>>& right, const AngleFactors<Number>& angles)
      : scratch_(ring.field()),
        right_then_v_(zero_matrix(ring.field())),
        open_ring_(zero_matrix(ring.field())),
        denominator_(ring.field()(0L)) {
    const Field<Number>& field = ring.field();
    for (const EndBlock<Number>& block : left) left_.push_back(left_matrix(field, block, angles.cos_2left));
    for (const EndBlock<Number>& block : right) right_.push_back(right_matrix(field, block, angles.cos_2right));
    sums_.assign(left.size(), std::vector<Number>(right.size(), field(0L)));
    for (const EndBlock<Number>& l : left) {
      minus_twice_corners_.emplace_back();
      for (const EndBlock<Number>& r : right)
        minus_twice_corners_.back().push_back(minus_twice_corner(field, l, r, angles));
    }
  }

  void operator()(const Leaf<Number>& leaf) {
    for (std::size_t r = 0; r < right_.size(); ++r) {
      multiply(right_then_v_, leaf.v, right_[r], scratch_);
      multiply(open_ring_, right_then_v_, leaf.h, scratch_);
      for (std::size_t l = 0; l < left_.size(); ++l) add_term(leaf, l, r);
    }
  }

  std::vector<std::vector<Number>> take() { return std::move(sums_); }

 private:
  static Matrix<Number> left_matrix(const Field<Number>& field, const EndBlock<Number>& block, const Number& cos_2th) {
    const auto [a, b] = diagonal(field, block, cos_2th);
    return block_matrix(field, b, a, block.determinant);  // entered from V, left to H
  }
  static Matrix<Number> right_matrix(const Field<Number>& field, const EndBlock<Number>& block, const Number& cos_2th) {
    const auto [a, b] = diagonal(field, block, cos_2th);
    return block_matrix(field, a, b, block.determinant);  // entered from H, left to V
  }
  static std::pair<Number, Number> diagonal(const Field<Number>& field, const EndBlock<Number>& block,
                                            const Number& cos_2th) {
    Number part = field(0L), a = field(0L), b = field(0L);
    multiply(part, block.half_difference, cos_2th);
    subtract(a, block.centre, part);
    add(b, block.centre, part);
    return {a, b};
  }
  // -2 C_L C_R, the ends' share of -2 kappa.
  static Number minus_twice_corner(const Field<Number>& field, const EndBlock<Number>& left,
                                   const EndBlock<Number>& right, const AngleFactors<Number>& angles) {
    Number corner = field(-2L);
    multiply(corner, corner, left.half_difference);
    multiply(corner, corner, right.half_difference);
    multiply(corner, corner, angles.sin_2left_sin_2right);
    return corner;
  }

  // coefficient / (tr(open_ring L) - 2 kappa)
  void add_term(const Leaf<Number>& leaf, std::size_t l, std::size_t r) {
    const Matrix<Number>& left = left_[l];
    scratch_.sum_of_products(denominator_, open_ring_.a, left.a, open_ring_.b, left.c);
    add(denominator_, denominator_, open_ring_.c);  // left.b is 1
    multiply(scratch_.first, open_ring_.d, left.d);
    add(denominator_, denominator_, scratch_.first);
    multiply(scratch_.first, leaf.kappa, minus_twice_corners_[l][r]);
    add(denominator_, denominator_, scratch_.first);
    divide(scratch_.first, leaf.coefficient, denominator_);
    add(sums_[l][r], sums_[l][r], scratch_.first);
  }

  Scratch<Number> scratch_;
  Matrix<Number> right_then_v_, open_ring_;
  Number denominator_;
  std::vector<Matrix<Number>> left_, right_;
  std::vector<std::vector<Number>> minus_twice_corners_;
  std::vector<std::vector<Number>> sums_;
};

}  // namespace

template <class Number>
std::vector<std::vector<Number>> silent_sums(const Ring<Number>& ring, const std::vector<EndBlock<Number>>& left,
                                             const std::vector<EndBlock<Number>>& right,
                                             const AngleFactors<Number>& angles) {
  Accumulator<Number> accumulator(ring, left, right, angles);
  ring.for_each_leaf(accumulator);
  auto sums = accumulator.take();
  for (std::size_t l = 0; l < left.size(); ++l) {
    for (std::size_t r = 0; r < right.size(); ++r) {
      multiply(sums[l][r], sums[l][r], left[l].dark);
      multiply(sums[l][r], sums[l][r], right[r].dark);
      multiply(sums[l][r], sums[l][r], ring.vacuum());
    }
  }
  return sums;
}

template std::vector<std::vector<Interval>> silent_sums(const Ring<Interval>&, const std::vector<EndBlock<Interval>>&,
                                                        const std::vector<EndBlock<Interval>>&,
                                                        const AngleFactors<Interval>&);
template std::vector<std::vector<Rational>> silent_sums(const Ring<Rational>&, const std::vector<EndBlock<Rational>>&,
                                                        const std::vector<EndBlock<Rational>>&,
                                                        const AngleFactors<Rational>&);

}  // namespace heraldgauge::reference
