#pragma once
// One pair of modes in a two-mode squeezed vacuum of mean photon number N per mode, heralded by a threshold detector.
// (N here is the mean photon number of a mode, the model's mean pairs per polarisation; not a number of stations.)
// Photon statistics are standard; the heralded moments were derived from the generating function 1/(1 + N - N x y) and
// verified by Fock sums.

#include "reference/arithmetic/field.hpp"

namespace heraldgauge::reference::closed_form {

// P(n) = N^n / (1+N)^(n+1), N >= 0.
template <class Number>
Number photon_number_probability(const Field<Number>& field, const Number& mean, unsigned n);

// Of the heralded mode before loss (which drops out of g2): the probability of the herald, the mean photon number given
// it, and g2 = <n(n-1)> / <n>^2. eta, d of the heralding detector; for eta = 1, d = 0, g2 = 2N/(1+N). Requires N > 0
// and a herald that can occur.
template <class Number>
struct HeraldedMode {
  Number herald_probability;
  Number mean;
  Number g2;
};
template <class Number>
HeraldedMode<Number> heralded_mode(const Field<Number>& field, const Number& mean, const Number& eta, const Number& d);

// First order in N for d << eta N: g2 = 2 N (2 - eta).
template <class Number>
Number heralded_g2_first_order(const Field<Number>& field, const Number& mean, const Number& eta);

// What two threshold detectors (eta_s, d_s) behind a 50:50 splitter measure in place of g2: P_h12 P_h / (P_h1 P_h2), by
// inclusion and exclusion of silent sets. Differs from g2 (0.01970 against 0.01980 at N = 0.01, unit efficiencies).
template <class Number>
struct Detection {
  Number eta, d;
};
template <class Number>
Number click_g2(const Field<Number>& field, const Number& mean, const Detection<Number>& herald,
                const Detection<Number>& signal);

}  // namespace heraldgauge::reference::closed_form
