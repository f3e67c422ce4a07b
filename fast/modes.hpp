#pragma once
// From a chain's numbers to the kernel's: matrices of each station outcome, structure of each station, ends, in
// double-double; then rounded to the kernel's own type, one point a lane.

#include <string>
#include <vector>

#include "fast/plan.hpp"

namespace heraldgauge::fast {

struct StationStructure {
  std::array<std::array<Overlap, 2>, 2> overlap;
  std::array<bool, 2> alike;
  bool polarisations_alike;
  bool as_before;  // numbers only; the cut-offs are compared by the plan
  friend bool operator==(const StationStructure&, const StationStructure&) = default;
};

struct ExactModes {
  LinkModes<DoubleDouble> modes;
  Buffer<StationStructure> structure;
  double smallest_complement = 1;  // the smallest 1 - x that is not zero
};

ExactModes modes_of(const ChainNumbers& numbers);

EndMode<double> rounded_end(const EndMode<DoubleDouble>& end);

// modes[i] goes to lane i.
template <class T>
LinkModes<T> rounded_modes(const std::vector<const LinkModes<DoubleDouble>*>& modes);

}  // namespace heraldgauge::fast
