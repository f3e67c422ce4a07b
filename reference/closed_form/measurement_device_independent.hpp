#pragma once
// Measurement-device-independent key distribution with phase-randomised weak coherent pulses: Ma and Razavi, Phys. Rev.
// A 86, 062319 (2012); Xu, Curty, Qi and Lo, New J. Phys. 15, 113007 (2013). From memory, verified by phase integrals
// and Fock sums.
//
// Written without cancellation: the diagonal gain's bracket 1 + 2y^2 - 4y I0(x) + I0(2x) is of fourth order in the
// field and is regrouped as 2 (y - I0(x))^2 + sum_{k>=2} x^(2k)/(k!)^2 [1 - 2 C(2k,k)/4^k], every term positive.

#include "reference/arithmetic/field.hpp"

namespace heraldgauge::reference::closed_form {

// Mean photon numbers eta_a mu_a, eta_b mu_b that would register of each side (>= 0), dark probability of each of the
// four detectors, misalignment as a bit flip.
struct CoherentPair {
  Interval mean_a, mean_b;
  Interval dark;
  Interval flip;
};

// Probability of an announced outcome per pulse pair, and of an erroneous one.
struct Gains {
  Interval events;
  Interval errors;
};
Gains mdi_rectilinear(const CoherentPair& pair);
Gains mdi_diagonal(const CoherentPair& pair);

// Single photons from both sides. Y11, and e11 Y11 in the diagonal basis, as printed.
template <class Number>
struct SinglePhotons {
  Number eta_a, eta_b, dark, flip;
};
template <class Number>
Number mdi_single_photon_yield(const Field<Number>& field, const SinglePhotons<Number>& pair);
template <class Number>
Number mdi_single_photon_errors(const Field<Number>& field, const SinglePhotons<Number>& pair);
// In the rectilinear basis the exact errors without misalignment exceed the printed formula by (1-p_d)^2 eta_a eta_b
// p_d / 2 (two photons bunched and a dark count): derived. Requires flip = 0.
template <class Number>
Number mdi_single_photon_rectilinear_errors(const Field<Number>& field, const SinglePhotons<Number>& pair);

// I0(x) - 1 = sum_{k>=1} (x^2/4)^k / (k!)^2 for bounded x >= 0, the modified Bessel function of order 0, to the last
// place.
Interval bessel_i0_minus_1(const Interval& x);

}  // namespace heraldgauge::reference::closed_form
