#pragma once
// A dense matrix of intervals.

#include "reference/arithmetic/interval.hpp"
#include "reference/arithmetic/matrix.hpp"

namespace heraldgauge::reference::pair_number {

class Matrix : public DenseMatrix<Interval> {
 public:
  // rows x columns zeros; both may be 0.
  Matrix(long rows, long columns, Precision bits) : DenseMatrix<Interval>(rows, columns, Interval(bits)) {}
};

}  // namespace heraldgauge::reference::pair_number
