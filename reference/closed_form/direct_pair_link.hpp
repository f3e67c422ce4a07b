#pragma once
// One pair source between two receivers without a station, threshold detectors, background: Ma, Fung and Lo, Phys. Rev.
// A 76, 012307 (2007). The formulas are from memory; where "verified" stands, a Fock sum over four detectors gives the
// same number.
//
// The source's letter lambda is the mean number of pairs per polarisation, sinh(chi)^2 (here mean_pairs), not the pair
// parameter lam = mean_pairs/(1 + mean_pairs); its mu is 2 lambda. eta is arm transmittance times detector efficiency.
// Its background yield of a side is Y0 = 1 - (1-d)^2 for two detectors of dark probability d (independent of the
// light), so 1 - Y0 is a square; it enters here by no_dark = 1 - d = sqrt(1 - Y0), which keeps rational inputs
// rational.

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/fault.hpp"

namespace heraldgauge::reference::closed_form {

// Number is Interval or Rational. All dimensionless: mean_pairs >= 0, the others in [0,1].
template <class Number>
struct DirectPairLink {
  Number mean_pairs;
  Number eta_a, eta_b;
  Number no_dark_a, no_dark_b;
  Number flip;  // e_d: probability that misalignment flips the bit of a signal event
};

// The letters for a chain, without misalignment. Faults unless it has no station, a squeezed source, and at each end
// two alike threshold detectors with no shared background.
template <class Number>
model::Expected<DirectPairLink<Number>> direct_pair_link_of(const Field<Number>& field, const model::Chain& chain);

// Q: at least one click on each side, per pump pulse. Verified; equal to the model's `gain` without stations, with
// alike detectors within each end.
template <class Number>
Number gain(const Field<Number>& field, const DirectPairLink<Number>& link);

// E Q as printed: Q/2 - 2 (1/2 - e_d) eta_a eta_b lambda (1+lambda) / [(1+eta_a lambda)(1+eta_b lambda) D],
// D = 1 + lambda (eta_a + eta_b - eta_a eta_b). A double click counts one half.
template <class Number>
Number error_gain_printed(const Field<Number>& field, const DirectPairLink<Number>& link);

// The same with the factor (1-d_a)(1-d_b) on the second term that the detector model needs and the print lacks: derived
// and verified, equal to the model's qber_rectilinear * gain for e_d = 0. The printed form is low by about d_a + d_b of
// that term.
template <class Number>
Number error_gain(const Field<Number>& field, const DirectPairLink<Number>& link);

// P(n) = (n+1) lambda^n / (1+lambda)^(n+2): n pairs in both polarisations together. Verified.
template <class Number>
Number pair_number_probability(const Field<Number>& field, const Number& mean_pairs, unsigned n);

// Y_n: both sides click, given n pairs. Verified.
template <class Number>
Number yield(const Field<Number>& field, const DirectPairLink<Number>& link, unsigned n);

// e_n Y_n as printed, whose sum over P(n) is error_gain_printed; the quotient of powers in it is written as the sum it
// stands for, so that eta_a = eta_b needs no limit.
template <class Number>
Number error_yield_printed(const Field<Number>& field, const DirectPairLink<Number>& link, unsigned n);

}  // namespace heraldgauge::reference::closed_form
