#include "reference/arithmetic/interval.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace heraldgauge::reference {
namespace {

Precision common(const Interval& a, const Interval& b) { return std::max(a.precision(), b.precision()); }

Rational exact(mpfr_srcptr x) {
  Rational value;
  mpfr_get_q(value.get_mpq_t(), x);
  return value;
}

double log2_magnitude(mpfr_srcptr x) {
  if (mpfr_zero_p(x)) return -std::numeric_limits<double>::infinity();
  if (!mpfr_number_p(x)) return std::numeric_limits<double>::infinity();
  long exponent = 0;
  const double significand = mpfr_get_d_2exp(&exponent, x, MPFR_RNDN);
  return std::log2(std::abs(significand)) + static_cast<double>(exponent);
}

// The engine with which model::Real evaluates itself in intervals.
struct Engine {
  using Number = Interval;
  Precision bits;
  Interval constant(const Rational& x) const { return {x, bits}; }
  Interval add(const Interval& a, const Interval& b) const { return a + b; }
  Interval subtract(const Interval& a, const Interval& b) const { return a - b; }
  Interval multiply(const Interval& a, const Interval& b) const { return a * b; }
  Interval divide(const Interval& a, const Interval& b) const { return a / b; }
  Interval power_of_ten(const Interval& x) const { return reference::power_of_ten(x); }
  Interval exponential(const Interval& x) const { return reference::exponential(x); }
  Interval hyperbolic_tangent(const Interval& x) const { return reference::hyperbolic_tangent(x); }
  Interval square_root(const Interval& x) const { return reference::square_root(x); }
};

template <class Function>
Interval apply(Function function, const Interval& x) {
  Interval result(x.precision());
  function(result.raw(), x.raw());
  result.claim_nothing_where_undefined();
  return result;
}

}  // namespace

Interval::Interval(const Rational& value, Precision bits) {
  mpfi_init2(data_, bits);
  mpfi_set_q(data_, value.get_mpq_t());
}

Interval::Interval(long value, Precision bits) {
  mpfi_init2(data_, bits);
  mpfi_set_si(data_, value);
}

Interval::Interval(const Rational& lower, const Rational& upper, Precision bits) {
  mpfi_init2(data_, bits);
  mpfi_interv_q(data_, lower.get_mpq_t(), upper.get_mpq_t());
}

Interval::Interval(const Interval& other) {
  mpfi_init2(data_, other.precision());
  mpfi_set(data_, other.data_);
}

Interval::Interval(Interval&& other) noexcept : data_{*other.data_} { other.data_->left._mpfr_d = nullptr; }

Interval& Interval::operator=(const Interval& other) {
  if (this == &other) return *this;
  if (data_->left._mpfr_d == nullptr) {
    mpfi_init2(data_, other.precision());
  } else if (precision() != other.precision()) {
    mpfi_set_prec(data_, other.precision());
  }
  mpfi_set(data_, other.data_);
  return *this;
}

Interval& Interval::operator=(Interval&& other) noexcept {
  std::swap(*data_, *other.data_);
  return *this;
}

void Interval::claim_nothing_where_undefined() {
  const bool ordered = mpfr_lessequal_p(&data_->left, &data_->right) != 0;  // false where an end is NaN
  const bool infinite_point = mpfr_inf_p(&data_->left) != 0 && mpfr_equal_p(&data_->left, &data_->right) != 0;
  if (ordered && !infinite_point) return;
  mpfr_set_inf(&data_->left, -1);
  mpfr_set_inf(&data_->right, 1);
}

bool Interval::contains(const Rational& value) const {
  return mpfr_cmp_q(&data_->left, value.get_mpq_t()) <= 0 && mpfr_cmp_q(&data_->right, value.get_mpq_t()) >= 0;
}

Rational Interval::lower() const { return exact(&data_->left); }
Rational Interval::upper() const { return exact(&data_->right); }

double Interval::log2_width() const {
  Interval width(64);
  mpfr_sub(&width.data_->right, &data_->right, &data_->left, MPFR_RNDU);
  return log2_magnitude(&width.data_->right);
}

double Interval::log2_mignitude() const {
  if (contains_zero()) return -std::numeric_limits<double>::infinity();
  return std::min(log2_magnitude(&data_->left), log2_magnitude(&data_->right));
}

Interval& Interval::operator+=(const Interval& b) {
  add(*this, *this, b);
  return *this;
}
Interval& Interval::operator-=(const Interval& b) {
  subtract(*this, *this, b);
  return *this;
}
Interval& Interval::operator*=(const Interval& b) {
  multiply(*this, *this, b);
  return *this;
}
Interval& Interval::operator/=(const Interval& b) {
  divide(*this, *this, b);
  return *this;
}
Interval Interval::operator-() const { return apply(mpfi_neg, *this); }

Interval operator+(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  Interval::add(result, a, b);
  return result;
}
Interval operator-(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  Interval::subtract(result, a, b);
  return result;
}
Interval operator*(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  Interval::multiply(result, a, b);
  return result;
}
Interval operator/(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  Interval::divide(result, a, b);
  return result;
}
Interval operator*(const Interval& a, long b) {
  Interval result(a.precision());
  mpfi_mul_si(result.raw(), a.raw(), b);
  return result;
}

Interval square(const Interval& x) { return apply(mpfi_sqr, x); }

Interval power(const Interval& x, unsigned long n) {
  Interval result(1L, x.precision());
  for (unsigned long bit = n == 0 ? 0 : 1UL << (std::numeric_limits<unsigned long>::digits - 1 - __builtin_clzl(n));
       bit != 0; bit >>= 1) {
    result = square(result);
    if ((n & bit) != 0) result *= x;
  }
  return result;
}

Interval square_root(const Interval& x) { return apply(mpfi_sqrt, x); }
Interval exponential(const Interval& x) { return apply(mpfi_exp, x); }
Interval exponential_m1(const Interval& x) { return apply(mpfi_expm1, x); }
Interval logarithm(const Interval& x) { return apply(mpfi_log, x); }
Interval binary_logarithm(const Interval& x) { return apply(mpfi_log2, x); }
Interval logarithm_1p(const Interval& x) { return apply(mpfi_log1p, x); }
Interval hyperbolic_tangent(const Interval& x) { return apply(mpfi_tanh, x); }
Interval cosine(const Interval& x) { return apply(mpfi_cos, x); }
Interval sine(const Interval& x) { return apply(mpfi_sin, x); }

Interval power_of_ten(const Interval& x) {
  Interval result(x.precision());
  mpfr_exp10(&result.raw()->left, &x.raw()->left, MPFR_RNDD);
  mpfr_exp10(&result.raw()->right, &x.raw()->right, MPFR_RNDU);
  return result;
}

Interval pi(Precision bits) {
  Interval result(bits);
  mpfi_const_pi(result.raw());
  return result;
}

Interval log_of_2(Precision bits) {
  Interval result(bits);
  mpfi_const_log2(result.raw());
  return result;
}

Interval hull(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  mpfi_union(result.raw(), a.raw(), b.raw());
  return result;
}

Interval absolute(const Interval& x) { return apply(mpfi_abs, x); }

Interval restricted(const Interval& x, const Rational& lower, const Rational& upper) {
  Interval result(x.precision());
  mpfi_intersect(result.raw(), x.raw(), Interval(lower, upper, x.precision()).raw());
  result.claim_nothing_where_undefined();
  return result;
}

Interval larger_of(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  mpfr_max(&result.raw()->left, &a.raw()->left, &b.raw()->left, MPFR_RNDD);
  mpfr_max(&result.raw()->right, &a.raw()->right, &b.raw()->right, MPFR_RNDU);
  return result;
}

Interval smaller_of(const Interval& a, const Interval& b) {
  Interval result(common(a, b));
  mpfr_min(&result.raw()->left, &a.raw()->left, &b.raw()->left, MPFR_RNDD);
  mpfr_min(&result.raw()->right, &a.raw()->right, &b.raw()->right, MPFR_RNDU);
  return result;
}

Interval midpoint(const Interval& x) {
  Interval result(x.precision());
  mpfi_mid(&result.raw()->left, x.raw());
  mpfr_set(&result.raw()->right, &result.raw()->left, MPFR_RNDN);
  result.claim_nothing_where_undefined();
  return result;
}

Interval lower_end(const Interval& x) {
  Interval result(x.precision());
  mpfi_set_fr(result.raw(), &x.raw()->left);
  return result;
}

Interval upper_end(const Interval& x) {
  Interval result(x.precision());
  mpfi_set_fr(result.raw(), &x.raw()->right);
  return result;
}

Interval raised(const Interval& x, const Interval& extra) {
  Interval result = x;
  mpfr_add(&result.raw()->right, &x.raw()->right, &extra.raw()->right, MPFR_RNDU);
  return result;
}

bool certainly_less(const Interval& a, const Interval& b) { return mpfr_less_p(&a.raw()->right, &b.raw()->left) != 0; }

bool overlap(const Interval& a, const Interval& b) {
  return mpfr_lessequal_p(&a.raw()->left, &b.raw()->right) != 0 &&
         mpfr_lessequal_p(&b.raw()->left, &a.raw()->right) != 0;
}

Interval enclose(const model::Real& value, Precision bits) { return value.evaluate(Engine{bits}); }

}  // namespace heraldgauge::reference
