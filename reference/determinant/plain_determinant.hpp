#pragma once
// The slow second form of the determinant route: the no-click determinant of the whole matrix, one subset of detectors
// at a time, nothing merged and nothing shared. It exists to be compared with the ring form.

#include <array>
#include <vector>

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/optics/angles.hpp"

namespace heraldgauge::reference {

// One bit a detector, in the order of the detectors of each place.
struct SilentSet {
  std::vector<unsigned> stations;  // one mask a station
  unsigned left = 0;
  unsigned right = 0;
};

// G(S) = g(S) prod_modes (1 - lam) / det(1 - sqrt(Lam) X_A sqrt(Lam) X_B^T), X = 1 - K_S split into the two classes of
// arms: the two arms of a source lie in different classes, the two that meet at a station in the same.
Interval no_click_probability(const model::Chain& chain, const EndAngles& angles, const SilentSet& silent,
                              Precision bits);

// Inclusion-exclusion over all clicking detectors, at the chain's own analyser angles.
Interval plain_pattern_probability(const model::Chain& chain, const model::Pattern& pattern, Precision bits);

// Gaussian elimination, each pivot the entry of its column farthest from zero; unbounded where no pivot excludes zero.
Interval determinant(std::vector<std::vector<Interval>> matrix, Precision bits);

}  // namespace heraldgauge::reference
