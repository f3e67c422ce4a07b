#pragma once
// Two-photon and four-photon interference with squeezed sources and threshold detectors. All forms were derived from
// silent sets and verified by Fock sums, except where a source is named. Closed forms for both exist in print (Takeoka,
// Jin, Sasaki, New J. Phys. 17, 043030 (2015), from its abstract); their parameters and normalisation could not be
// read.

#include "reference/arithmetic/field.hpp"

namespace heraldgauge::reference::closed_form {

// Largest and smallest coincidence probability, over the analyser angle or the delay.
template <class Number>
struct Extremes {
  Number largest, smallest;
};
template <class Number>
Number visibility(const Extremes<Number>& extremes) {
  return (extremes.largest - extremes.smallest) / (extremes.largest + extremes.smallest);
}

// One polarisation-entangled source, mean_pairs = lambda per polarisation, ONE threshold detector on each side looked
// at (so not the model's `visibility`, which wants the cross detectors silent); dark probability d each.
template <class Number>
Extremes<Number> pair_coincidence(const Field<Number>& field, const Number& mean_pairs, const Number& eta_a,
                                  const Number& eta_b, const Number& d);
// The limit eta -> 0, d = 0: V = (mu + 2)/(3 mu + 2), mu = 2 lambda; pairs in many modes (distinguishable): 1/(1 + mu).
// Takesue and Shimizu (2010), from memory.
template <class Number>
Number pair_visibility_weak(const Field<Number>& field, const Number& mean_pairs);
template <class Number>
Number pair_visibility_distinguishable(const Field<Number>& field, const Number& mean_pairs);

// Heralded Hong-Ou-Mandel dip: two two-mode sources of mean photon number N, heralds (eta_h, d_h), signals (eta_s, d_s)
// meeting on a 50:50 splitter, fourfold coincidences. `largest` is outside the dip (fully distinguishable), `smallest`
// inside; the dip's own visibility is 1 - smallest/largest.
template <class Number>
struct FourfoldLink {
  Number mean, eta_herald, dark_herald, eta_signal, dark_signal;
};
template <class Number>
Extremes<Number> fourfold(const Field<Number>& field, const FourfoldLink<Number>& link);
// The dip's visibility for eta -> 0, d = 0: (1+2N)^2 / (1 + 8N + 10N^2).
template <class Number>
Number fourfold_visibility_weak(const Field<Number>& field, const Number& mean);

}  // namespace heraldgauge::reference::closed_form
