#pragma once

#include <vector>

#include "reference/arithmetic/matrix.hpp"

namespace heraldgauge::compare::fock {

template <class Number>
using Matrix = reference::DenseMatrix<Number>;

// One matrix a sector |Delta| = 0, 1, ...
template <class Number>
using Sectors = std::vector<Matrix<Number>>;

}  // namespace heraldgauge::compare::fock
