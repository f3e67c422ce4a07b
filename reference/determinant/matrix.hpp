#pragma once
// 2x2 matrices over a Field's Numbers, for the ring form of the no-click determinant.

#include "reference/arithmetic/field.hpp"

namespace heraldgauge::reference {

template <class Number>
struct Matrix {
  Number a, b;  // first row
  Number c, d;  // second row
};

// Room for one product, so that the inner loops allocate nothing.
template <class Number>
struct Scratch {
  explicit Scratch(const Field<Number>& field) : first(field(0L)), second(field(0L)) {}
  Number first, second;

  // out = p q + r s
  void sum_of_products(Number& out, const Number& p, const Number& q, const Number& r, const Number& s) {
    multiply(first, p, q);
    multiply(second, r, s);
    add(out, first, second);
  }
};

// out = x y; out must be neither x nor y.
template <class Number>
void multiply(Matrix<Number>& out, const Matrix<Number>& x, const Matrix<Number>& y, Scratch<Number>& scratch) {
  scratch.sum_of_products(out.a, x.a, y.a, x.b, y.c);
  scratch.sum_of_products(out.b, x.a, y.b, x.b, y.d);
  scratch.sum_of_products(out.c, x.c, y.a, x.d, y.c);
  scratch.sum_of_products(out.d, x.c, y.b, x.d, y.d);
}

template <class Number>
Matrix<Number> zero_matrix(const Field<Number>& field) {
  return {field(0L), field(0L), field(0L), field(0L)};
}

// A source: [[0, lam], [1, 0]].
template <class Number>
Matrix<Number> source_matrix(const Field<Number>& field, const Number& lam) {
  return {field(0L), lam, field(1L), field(0L)};
}

// A block with entrance element a, exit element b and determinant a b - x^2: [[-a, 1], [x^2 - a b, b]].
template <class Number>
Matrix<Number> block_matrix(const Field<Number>& field, const Number& entrance, const Number& exit,
                            const Number& determinant) {
  Matrix<Number> block{field(0L), field(1L), field(0L), exit};
  subtract(block.a, block.a, entrance);
  subtract(block.c, block.c, determinant);
  return block;
}

}  // namespace heraldgauge::reference
