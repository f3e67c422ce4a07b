#pragma once
// Intervals with outward rounding: a thin owner of mpfi_t. The promise of every function below: if each argument
// contains a number x_i, the result contains f(x_1, ...). Rounding is done by MPFR in software, never by the hardware's
// modes.
//
// Precision belongs to the object, in bits of each end's significand (at least 2). The result of an operator has the
// larger precision of its operands. There is no operator<: comparisons are certain, or answer "not certain".
// Dividing by an interval that contains 0 gives an unbounded interval; is_bounded() tells. No end is ever NaN: where a
// function is not defined on all of its argument (0/0, the root of a negative number), the result is the whole line,
// which claims nothing. A moved-from object may be assigned to or destroyed, nothing else.

#include <mpfi.h>

#include <utility>

#include "reference/model/rational.hpp"
#include "reference/model/real.hpp"

namespace heraldgauge::reference {

using model::Rational;
using Precision = mpfr_prec_t;

class Interval {
 public:
  explicit Interval(Precision bits) {
    mpfi_init2(data_, bits);
    mpfi_set_si(data_, 0);
  }
  Interval(const Rational& value, Precision bits);
  Interval(long value, Precision bits);
  Interval(const Rational& lower, const Rational& upper, Precision bits);  // requires lower <= upper

  Interval(const Interval& other);
  Interval(Interval&& other) noexcept;
  Interval& operator=(const Interval& other);
  Interval& operator=(Interval&& other) noexcept;
  ~Interval() {
    if (data_->left._mpfr_d != nullptr) mpfi_clear(data_);
  }

  Precision precision() const { return mpfi_get_prec(data_); }

  bool is_bounded() const { return mpfi_bounded_p(data_) != 0; }
  bool contains_zero() const { return mpfi_has_zero(data_) != 0; }
  bool is_exactly_zero() const { return mpfi_is_zero(data_) > 0; }
  bool is_certainly_positive() const { return mpfi_is_strictly_pos(data_) > 0; }
  bool is_certainly_negative() const { return mpfi_is_strictly_neg(data_) > 0; }
  bool contains(const Rational& value) const;

  // The ends as exact numbers; both require is_bounded().
  Rational lower() const;
  Rational upper() const;
  // log2 of an upper bound on (upper - lower), and of a lower bound on min |x|; -infinity for 0. For choosing
  // precisions and cut-offs only, never for a certificate.
  double log2_width() const;
  double log2_mignitude() const;

  Interval& operator+=(const Interval& b);
  Interval& operator-=(const Interval& b);
  Interval& operator*=(const Interval& b);
  Interval& operator/=(const Interval& b);
  Interval operator-() const;

  // out = a op b without temporaries, rounded outward at out's precision; out may be a or b.
  static void add(Interval& out, const Interval& a, const Interval& b) { mpfi_add(out.data_, a.data_, b.data_); }
  static void subtract(Interval& out, const Interval& a, const Interval& b) { mpfi_sub(out.data_, a.data_, b.data_); }
  static void multiply(Interval& out, const Interval& a, const Interval& b) { mpfi_mul(out.data_, a.data_, b.data_); }
  static void divide(Interval& out, const Interval& a, const Interval& b) {
    mpfi_div(out.data_, a.data_, b.data_);
    out.claim_nothing_where_undefined();
  }
  // Becomes the whole line where an end is NaN, the lower end +infinity, the upper end -infinity, or the ends are
  // crossed.
  void claim_nothing_where_undefined();

  mpfi_ptr raw() { return data_; }
  mpfi_srcptr raw() const { return data_; }

 private:
  mpfi_t data_;  // left._mpfr_d is null in a moved-from object
};

Interval operator+(const Interval& a, const Interval& b);
Interval operator-(const Interval& a, const Interval& b);
Interval operator*(const Interval& a, const Interval& b);
Interval operator/(const Interval& a, const Interval& b);
Interval operator*(const Interval& a, long b);

Interval square(const Interval& x);                  // x^2, never negative
Interval power(const Interval& x, unsigned long n);  // x^n by repeated squaring
Interval square_root(const Interval& x);             // requires x >= 0
Interval exponential(const Interval& x);
Interval exponential_m1(const Interval& x);  // e^x - 1
Interval power_of_ten(const Interval& x);
Interval logarithm(const Interval& x);         // natural; requires x > 0
Interval binary_logarithm(const Interval& x);  // requires x > 0
Interval logarithm_1p(const Interval& x);      // ln(1+x); requires x > -1
Interval hyperbolic_tangent(const Interval& x);
Interval cosine(const Interval& x);  // radians
Interval sine(const Interval& x);
Interval pi(Precision bits);
Interval log_of_2(Precision bits);

Interval hull(const Interval& a, const Interval& b);
Interval absolute(const Interval& x);
// The part of x in [lower, upper], for quantities that are known to lie there. Where the two do not meet, something was
// wrong before, and the result is the whole line.
Interval restricted(const Interval& x, const Rational& lower, const Rational& upper);
// Enclose max(x, y) and min(x, y).
Interval larger_of(const Interval& a, const Interval& b);
Interval smaller_of(const Interval& a, const Interval& b);
Interval midpoint(const Interval& x);   // a point inside x; requires is_bounded()
Interval lower_end(const Interval& x);  // the ends of x as points
Interval upper_end(const Interval& x);
// x with its upper end raised by the upper end of extra (extra >= 0): [x.lower, x.upper + extra.upper].
Interval raised(const Interval& x, const Interval& extra);

bool certainly_less(const Interval& a, const Interval& b);
bool overlap(const Interval& a, const Interval& b);

// Encloses an exact real at a precision.
Interval enclose(const model::Real& value, Precision bits);

}  // namespace heraldgauge::reference
