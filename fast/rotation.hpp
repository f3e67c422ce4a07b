#pragma once
// Photon numbers (h, v) seen through an analyser: U_n(h, p) = <h, n-h | p, n-p at the analyser>, the elements of a
// rotation by the analyser angle in the space of n photons, for n = 0..largest.

#include <memory>
#include <vector>

#include "fast/double_double.hpp"
#include "reference/model/rational.hpp"

namespace heraldgauge::fast {

class Rotation {
 public:
  // degrees in [0, 180), exact. Built in double-double by adding one photon at a time (Risbo 1996): each step is a
  // contraction, so the error in norm is below 2^-96 per photon, and the table rounded to binary64 is right to its last
  // place unless an element is smaller than 2^-40.
  Rotation(const model::Rational& degrees, int largest);

  int largest() const { return largest_; }
  const double* row(double, int n, int h) const { return rounded_.data() + position(n, h); }
  const DoubleDouble* row(DoubleDouble, int n, int h) const { return exact_.data() + position(n, h); }
  bool aligned() const { return aligned_; }    // at 0 or 90 degrees
  bool balanced() const { return balanced_; }  // at 45 degrees

 private:
  static std::size_t position(int n, int h) {
    const auto m = static_cast<std::size_t>(n);
    return m * (m + 1) * (2 * m + 1) / 6 + static_cast<std::size_t>(h) * (m + 1);
  }
  int largest_;
  bool aligned_;
  bool balanced_;
  std::vector<DoubleDouble> exact_;
  std::vector<double> rounded_;
};

// The table for this angle with at least `largest` photons; kept for the next call of the same thread.
std::shared_ptr<const Rotation> rotation(const model::Rational& degrees, int largest);

// sqrt((a+delta)! / a!), which ties a normalised end to the unnormalised station elements.
const double* raising_factors(double, int delta);
const DoubleDouble* raising_factors(DoubleDouble, int delta);

inline constexpr int largest_pairs = 128;  // pairs kept per source, at most: keeps every factor inside binary64

}  // namespace heraldgauge::fast
