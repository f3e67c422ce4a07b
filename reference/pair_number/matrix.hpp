#pragma once
// A dense matrix of intervals, row by row.

#include <vector>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference::pair_number {

class Matrix {
 public:
  // rows x columns zeros; both may be 0.
  Matrix(long rows, long columns, Precision bits)
      : rows_(rows), columns_(columns), entries_(static_cast<std::size_t>(rows * columns), Interval(bits)) {}

  Interval& operator()(long row, long column) { return entries_[static_cast<std::size_t>(row * columns_ + column)]; }
  const Interval& operator()(long row, long column) const {
    return entries_[static_cast<std::size_t>(row * columns_ + column)];
  }
  long rows() const { return rows_; }
  long columns() const { return columns_; }

 private:
  long rows_;
  long columns_;
  std::vector<Interval> entries_;
};

}  // namespace heraldgauge::reference::pair_number
