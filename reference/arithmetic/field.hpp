#pragma once
// One name for the two arithmetics in which the determinant route runs: outward-rounded intervals of a precision, and
// exact rationals. A Field turns exact reals into its Numbers; the free functions write their result in place.

#include "reference/arithmetic/interval.hpp"
#include "reference/model/real.hpp"

namespace heraldgauge::reference {

template <class Number>
struct Field;

template <>
struct Field<Interval> {
  Precision bits;
  Interval operator()(const model::Real& x) const { return enclose(x, bits); }
  Interval operator()(const Rational& x) const { return {x, bits}; }
  Interval operator()(long x) const { return {x, bits}; }
};

// Requires that every Real it is given is rational.
template <>
struct Field<Rational> {
  Rational operator()(const model::Real& x) const { return x.rational(); }
  Rational operator()(const Rational& x) const { return x; }
  Rational operator()(long x) const { return Rational(x); }
};

inline void add(Interval& out, const Interval& a, const Interval& b) { Interval::add(out, a, b); }
inline void subtract(Interval& out, const Interval& a, const Interval& b) { Interval::subtract(out, a, b); }
inline void multiply(Interval& out, const Interval& a, const Interval& b) { Interval::multiply(out, a, b); }
inline void divide(Interval& out, const Interval& a, const Interval& b) { Interval::divide(out, a, b); }
inline bool is_exactly_zero(const Interval& x) { return x.is_exactly_zero(); }

inline void add(Rational& out, const Rational& a, const Rational& b) { out = a + b; }
inline void subtract(Rational& out, const Rational& a, const Rational& b) { out = a - b; }
inline void multiply(Rational& out, const Rational& a, const Rational& b) { out = a * b; }
inline void divide(Rational& out, const Rational& a, const Rational& b) { out = a / b; }
inline bool is_exactly_zero(const Rational& x) { return x == 0; }

}  // namespace heraldgauge::reference
