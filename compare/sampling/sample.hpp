#pragma once
// Simulated trials and what they estimate.

#include <array>
#include <cstdint>

#include "compare/sampling/trial.hpp"

namespace heraldgauge::compare {

// Counts of heralded trials by end clicks, [left][right], one table a basis: each heralded trial is looked at once in
// each.
struct Counts {
  std::uint64_t trials = 0;
  std::uint64_t heralds = 0;
  std::map<reference::Basis, std::array<std::array<std::uint64_t, 4>, 4>> ends;
};

// When to stop: after that many trials, or once that many trials were heralded (0: whatever).
struct Stop {
  std::uint64_t trials = 0;
  std::uint64_t heralds = 0;
};

// A sample of a fixed seed.
Counts sampled(TrialModel& trials, const std::vector<reference::Basis>& bases, const Stop& stop, std::uint64_t seed);

// Heralded trials after which the relative standard error 1/sqrt(heralds) is at most this.
std::uint64_t heralds_for(double relative_standard_error);

// 95 % interval of a probability of which `successes` were seen in `trials` (Wilson 1927).
struct ConfidenceInterval {
  double lower, upper;
};
ConfidenceInterval wilson_interval(std::uint64_t successes, std::uint64_t trials);

}  // namespace heraldgauge::compare
