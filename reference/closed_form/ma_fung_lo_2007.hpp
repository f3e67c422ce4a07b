#pragma once
// The direct link of one squeezed source between two ends: the gain printed by X. Ma, C.-H. F. Fung and H.-K. Lo, Phys.
// Rev. A 76, 012307 (2007). Formula from memory; held against this project's own formula in the tests.

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/fault.hpp"

namespace heraldgauge::reference {

// In that paper's letters. mean_pairs: lambda = sinh(chi)^2, per polarisation; eta: arm transmittance times detector
// efficiency; dark_count: Y = 1 - (1-d)^2, at least one dark event among the two detectors of an end.
struct PairLink {
  model::Real mean_pairs;
  model::Real eta_left;
  model::Real eta_right;
  model::Real dark_count_left;
  model::Real dark_count_right;
};

// The letters for a chain. Faults unless it has no station, a squeezed source, and at each end two alike threshold
// detectors with no shared background.
model::Expected<PairLink> pair_link_of(const model::Chain& chain);

// Probability per trial of at least one click at each end:
// 1 - (1-Y_A)/(1+eta_A mu)^2 - (1-Y_B)/(1+eta_B mu)^2 + (1-Y_A)(1-Y_B)/(1+(eta_A+eta_B-eta_A eta_B) mu)^2.
Interval gain(const PairLink& link, Precision bits);

}  // namespace heraldgauge::reference
