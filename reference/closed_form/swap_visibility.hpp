#pragma once
// Entanglement swapping at one station with two polarisation-SINGLET squeezed sources (psi-, where the model has phi+:
// H and V exchange at one end, with a sign). Derived for this project and verified by Fock sums; the printed
// visibilities of the papers on this set-up could not be read. Sources of mean_pairs = lambda per polarisation, all
// arms alike, eta_outer and eta_centre with the arms' transmittance in them, dark probability d at all eight detectors.
// Herald: H in output 1 and V in output 2 of the splitter click, the other two stay silent.
//
// The probability that a set of detectors is silent is prod (1-d_i) / det[(1+lambda) 1 - lambda X M T M^T], X and T the
// outer and the inner loss matrices of the set, M the singlet coupling.

#include "reference/arithmetic/interval.hpp"
#include "reference/closed_form/interference.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference::closed_form {

struct SwapLink {
  Interval mean_pairs, eta_outer, eta_centre, dark;
  model::DarkModel dark_model = model::DarkModel::independent;
};

enum class OuterReading {
  two_detectors,  // one detector of each end is looked at
  exclusive       // all four are read, the two others must be silent
};

// Largest (crossed analysers) and smallest (parallel ones) coincidence per trial, left analyser at left_deg.
Extremes<Interval> swap_coincidence(const SwapLink& link, OuterReading reading, const Rational& left_deg);
// The herald alone, per trial: one of its four patterns.
Interval swap_herald(const SwapLink& link);

// Limits of the visibility: eta -> 0, d = 0 (any basis, either reading): (1+lambda)^2 / (1 + 10 lambda + 17 lambda^2);
// and eta = 1, d = 0, analysers at 0 or 90 degrees, two detectors: 1 / (1 + 4 lambda + 2 lambda^2).
Interval swap_visibility_weak(const Interval& mean_pairs);
Interval swap_visibility_lossless(const Interval& mean_pairs);

}  // namespace heraldgauge::reference::closed_form
