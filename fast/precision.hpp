#pragma once
// What a kernel needs to know of a number type: double, Lanes of doubles, or DoubleDouble.

#include <cmath>

#include "fast/double_double.hpp"
#include "fast/lanes.hpp"

namespace heraldgauge::fast {

// Rough<T>: holds magnitudes and bounds, in binary64. Table<T>: constants that are the same for every lane.
template <class T>
struct Precision;

template <>
struct Precision<double> {
  using Rough = double;
  using Table = double;
  static constexpr int width = 1;
  static constexpr double unit = 0x1p-53;  // relative error of one operation, and of a rounded input
};

template <int Width>
struct Precision<Lanes<Width>> {
  using Rough = Lanes<Width>;
  using Table = double;
  static constexpr int width = Width;
  static constexpr double unit = 0x1p-53;
};

template <>
struct Precision<DoubleDouble> {
  using Rough = double;
  using Table = DoubleDouble;
  static constexpr int width = 1;
  static constexpr double unit = 0x1p-96;  // operations are better; inputs with an exponential or a complement are not
};

template <class T>
using Rough = typename Precision<T>::Rough;
template <class T>
using Table = typename Precision<T>::Table;

inline double rough(double x) { return x; }
inline double rough(const DoubleDouble& x) { return x.hi; }
template <int Width>
Lanes<Width> rough(const Lanes<Width>& x) {
  return x;
}

inline double lane_of(double x, int) { return x; }
template <int Width>
double lane_of(const Lanes<Width>& x, int index) {
  return x.lane(index);
}
inline void set_lane(double& to, int, double x) { to = x; }
template <int Width>
void set_lane(Lanes<Width>& to, int index, double x) {
  to.set_lane(index, x);
}

// (more + less) / (more - less) where that is finite, else 1.
inline double magnification(double more, double less) { return more > less ? (more + less) / (more - less) : 1.0; }
inline double magnification(const DoubleDouble& more, const DoubleDouble& less) {
  return less < more ? (more.hi + less.hi) / (more - less).hi : 1.0;
}
template <int Width>
Lanes<Width> magnification(const Lanes<Width>& more, const Lanes<Width>& less) {
  Lanes<Width> result;
  for (int i = 0; i < Width; ++i) result.set_lane(i, magnification(more.lane(i), less.lane(i)));
  return result;
}

inline double geometric_mean(double a, double b) { return std::sqrt(a) * std::sqrt(b); }
inline DoubleDouble geometric_mean(const DoubleDouble& a, const DoubleDouble& b) {
  return square_root(a) * square_root(b);
}
template <int Width>
Lanes<Width> geometric_mean(const Lanes<Width>& a, const Lanes<Width>& b) {
  Lanes<Width> result;
  for (int i = 0; i < Width; ++i) result.set_lane(i, geometric_mean(a.lane(i), b.lane(i)));
  return result;
}

// A power of two that brings x near 1, a lane; 1 for zero.
inline int binary_exponent(double x) { return x > 0 ? std::ilogb(x) : 0; }

}  // namespace heraldgauge::fast
