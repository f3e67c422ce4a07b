#pragma once
// A dense matrix, row by row.

#include <vector>

namespace heraldgauge::reference {

template <class Number>
class DenseMatrix {
 public:
  // Both may be 0.
  DenseMatrix(long rows, long columns, const Number& value)
      : rows_(rows), columns_(columns), entries_(static_cast<std::size_t>(rows * columns), value) {}

  Number& operator()(long row, long column) { return entries_[static_cast<std::size_t>(row * columns_ + column)]; }
  const Number& operator()(long row, long column) const {
    return entries_[static_cast<std::size_t>(row * columns_ + column)];
  }
  long rows() const { return rows_; }
  long columns() const { return columns_; }

 private:
  long rows_;
  long columns_;
  std::vector<Number> entries_;
};

}  // namespace heraldgauge::reference
