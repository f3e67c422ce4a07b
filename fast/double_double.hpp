#pragma once
// Numbers of about 106 bits as an unevaluated sum of two doubles (error-free transforms of Knuth, 1969, and Dekker,
// 1971). Sums and products have a relative error below 2^-103 (Joldes, Muller and Popescu, 2017: at most 3 and 7 times
// 2^-106), quotients below 2^-102, as long as nothing overflows or underflows.

#include <cmath>

namespace heraldgauge::fast {

struct DoubleDouble {
  double hi = 0;
  double lo = 0;

  constexpr DoubleDouble() = default;
  constexpr DoubleDouble(double x) : hi(x) {}
  constexpr DoubleDouble(double high, double low) : hi(high), lo(low) {}
  explicit operator double() const { return hi; }
};

// a + b where |a| >= |b| or a = 0.
inline DoubleDouble quick_two_sum(double a, double b) {
  const double s = a + b;
  return {s, b - (s - a)};
}

inline DoubleDouble two_sum(double a, double b) {
  const double s = a + b;
  const double t = s - a;
  return {s, (a - (s - t)) + (b - t)};
}

inline DoubleDouble split(double a) {
  const double c = 134217729.0 * a;  // 2^27 + 1
  const double high = c - (c - a);
  return {high, a - high};
}

inline DoubleDouble two_product(double a, double b) {
  const double p = a * b;
  const DoubleDouble x = split(a);
  const DoubleDouble y = split(b);
  return {p, ((x.hi * y.hi - p) + x.hi * y.lo + x.lo * y.hi) + x.lo * y.lo};
}

inline DoubleDouble operator-(const DoubleDouble& a) { return {-a.hi, -a.lo}; }

inline DoubleDouble operator+(const DoubleDouble& a, const DoubleDouble& b) {
  const DoubleDouble s = two_sum(a.hi, b.hi);
  const DoubleDouble t = two_sum(a.lo, b.lo);
  const DoubleDouble u = quick_two_sum(s.hi, s.lo + t.hi);
  return quick_two_sum(u.hi, u.lo + t.lo);
}

inline DoubleDouble operator-(const DoubleDouble& a, const DoubleDouble& b) { return a + (-b); }

inline DoubleDouble operator*(const DoubleDouble& a, const DoubleDouble& b) {
  const DoubleDouble p = two_product(a.hi, b.hi);
  return quick_two_sum(p.hi, p.lo + (a.hi * b.lo + a.lo * b.hi));
}

inline DoubleDouble operator/(const DoubleDouble& a, const DoubleDouble& b) {
  const double first = a.hi / b.hi;
  const DoubleDouble rest = a - b * DoubleDouble(first);
  const double second = rest.hi / b.hi;
  const DoubleDouble last = rest - b * DoubleDouble(second);
  return quick_two_sum(first, second) + DoubleDouble(last.hi / b.hi);
}

inline DoubleDouble& operator+=(DoubleDouble& a, const DoubleDouble& b) { return a = a + b; }
inline bool operator==(const DoubleDouble& a, const DoubleDouble& b) { return a.hi == b.hi && a.lo == b.lo; }
inline bool operator<(const DoubleDouble& a, const DoubleDouble& b) {
  return a.hi < b.hi || (a.hi == b.hi && a.lo < b.lo);
}

// Relative error below 2^-98 (arguments of the exponential up to 700 in size; relative to expm1 itself near 0).
DoubleDouble square_root(const DoubleDouble& x);
DoubleDouble exponential(const DoubleDouble& x);
DoubleDouble exponential_minus_one(const DoubleDouble& x);

struct CosineSine {
  DoubleDouble cosine;
  DoubleDouble sine;
};

}  // namespace heraldgauge::fast
