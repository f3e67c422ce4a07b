#pragma once
// Largest and smallest value of a finite Fourier sum, in binary64, by sampling and Newton's method.

#include <functional>
#include <vector>

namespace heraldgauge::compare::fock {

// The harmonics of a function of phi from its values at phi_j = 2 pi j/(2Q+1), j = 0..2Q.
struct Harmonics {
  std::vector<double> cosine, sine;  // q = 0..Q
};
Harmonics harmonics_of(const std::vector<double>& values);

// Where it is largest and smallest, in radians.
struct ExtremeAngles {
  double largest, smallest;
};
ExtremeAngles extreme_angles(const Harmonics& harmonics);

}  // namespace heraldgauge::compare::fock
