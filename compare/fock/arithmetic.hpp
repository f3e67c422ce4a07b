#pragma once
// The arithmetics in which the explicit Fock evaluator runs: binary32 and binary64, outward-rounded intervals, exact
// rationals. An Arithmetic turns exact numbers into its Numbers.

#include <cmath>
#include <numbers>
#include <vector>

#include "compare/binary64.hpp"
#include "reference/arithmetic/interval.hpp"
#include "reference/optics/angles.hpp"

namespace heraldgauge::compare::fock {

using model::Rational;
using reference::Interval;

template <class Number>
struct Arithmetic;

template <>
struct Arithmetic<double> {
  double operator()(const model::Real& x) const { return to_binary64(x); }
  double operator()(const Rational& x) const { return x.get_d(); }
  double operator()(long x) const { return static_cast<double>(x); }
  double cosine(const Rational& degrees) const { return std::cos(degrees.get_d() * std::numbers::pi / 180); }
  double sine(const Rational& degrees) const { return std::sin(degrees.get_d() * std::numbers::pi / 180); }
  double mean_of_dark_count(double d) const { return -std::log1p(-d); }
};

template <>
struct Arithmetic<float> {
  float operator()(const model::Real& x) const { return static_cast<float>(to_binary64(x)); }
  float operator()(const Rational& x) const { return static_cast<float>(x.get_d()); }
  float operator()(long x) const { return static_cast<float>(x); }
  float cosine(const Rational& degrees) const { return static_cast<float>(Arithmetic<double>{}.cosine(degrees)); }
  float sine(const Rational& degrees) const { return static_cast<float>(Arithmetic<double>{}.sine(degrees)); }
  float mean_of_dark_count(float d) const { return -std::log1p(-d); }
};

template <>
struct Arithmetic<Interval> {
  reference::Precision bits;
  Interval operator()(const model::Real& x) const { return reference::enclose(x, bits); }
  Interval operator()(const Rational& x) const { return {x, bits}; }
  Interval operator()(long x) const { return {x, bits}; }
  Interval cosine(const Rational& degrees) const { return reference::cosine_of_degrees(degrees, bits); }
  Interval sine(const Rational& degrees) const { return reference::sine_of_degrees(degrees, bits); }
  Interval mean_of_dark_count(const Interval& d) const { return -reference::logarithm_1p(-d); }
};

// Requires rational inputs and analyser angles that are multiples of 45 degrees. Serves to tell which sums vanish, so a
// dark count's mean, which is irrational, is replaced by d, which vanishes where it does.
template <>
struct Arithmetic<Rational> {
  Rational operator()(const model::Real& x) const { return x.rational(); }
  Rational operator()(const Rational& x) const { return x; }
  Rational operator()(long x) const { return Rational(x); }
  Rational cosine(const Rational& degrees) const { return reference::rational_cosine(degrees).value(); }
  Rational sine(const Rational& degrees) const { return reference::rational_cosine(90 - degrees).value(); }
  Rational mean_of_dark_count(const Rational& d) const { return d; }
};

// min(1, x).
template <class Number>
Number at_most_one(const Arithmetic<Number>& number, const Number& x) {
  const Number one = number(1L);
  return one < x ? one : x;
}
inline Interval at_most_one(const Arithmetic<Interval>& number, const Interval& x) {
  return reference::smaller_of(x, number(1L));
}

// x^0, x^1, ..., x^last.
template <class Number>
std::vector<Number> powers(const Arithmetic<Number>& number, const Number& x, long last) {
  std::vector<Number> result{number(1L)};
  for (long n = 1; n <= last; ++n) result.push_back(result.back() * x);
  return result;
}

// C(n, k) and n! up to a largest n, by additions and multiplications of integers only.
template <class Number>
class Counting {
 public:
  Counting(const Arithmetic<Number>& number, long largest) {
    for (long n = 0; n <= largest; ++n) {
      factorials_.push_back(n == 0 ? number(1L) : factorials_.back() * number(n));
      std::vector<Number> row{number(1L)};
      for (long k = 1; k < n; ++k) row.push_back(binomial(n - 1, k - 1) + binomial(n - 1, k));
      if (n > 0) row.push_back(number(1L));
      rows_.push_back(std::move(row));
    }
  }
  const Number& factorial(long n) const { return factorials_[static_cast<std::size_t>(n)]; }
  const Number& binomial(long n, long k) const {
    return rows_[static_cast<std::size_t>(n)][static_cast<std::size_t>(k)];
  }

 private:
  std::vector<Number> factorials_;
  std::vector<std::vector<Number>> rows_;
};

}  // namespace heraldgauge::compare::fock
