#pragma once
// Decoy-state key distribution with phase-randomised coherent pulses: Ma, Qi, Zhao and Lo, Phys. Rev. A 72, 012326
// (2005), from memory. eta is fibre times receiver (eta_Bob 10^(-alpha L/10)), mu the mean photon number, Y0 the
// background yield.

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference::closed_form {

struct CoherentLink {
  Interval eta;
  Interval background;  // Y0
  Interval flip;        // e_d
};

// P(n) = mu^n e^-mu / n! (restated on the first page of quant-ph/0410075, read).
Interval poisson_probability(const Interval& mean, unsigned n);

// Q = Y0 + 1 - e^(-eta mu) as printed, and with the product Y0 (1 - e^(-eta mu)) that the print drops.
Interval coherent_gain_printed(const CoherentLink& link, const Interval& mean);
Interval coherent_gain(const CoherentLink& link, const Interval& mean);
// E Q = Y0/2 + e_d (1 - e^(-eta mu)) as printed.
Interval coherent_error_gain_printed(const CoherentLink& link, const Interval& mean);

// Key per pulse with infinitely many decoys: q { -Q f h2(E) + Q1 [1 - h2(e1)] }, Q1 = Y1 mu e^-mu, Y1 = Y0 + eta,
// e1 = (Y0/2 + e_d eta)/Y1. May be negative.
struct KeyTerms {
  Interval error_correction_factor;  // f
  Interval sifting;                  // q
};
Interval infinite_decoy_rate(const CoherentLink& link, const Interval& mean, const KeyTerms& terms);
// With a vacuum and a weak decoy of mean nu < mu: Y1 >= mu/(mu nu - nu^2) [Q_nu e^nu - Q_mu e^mu nu^2/mu^2
// - (mu^2 - nu^2)/mu^2 Y0], e1 <= (E_nu Q_nu e^nu - Y0/2)/(Y1 nu).
Interval vacuum_and_weak_decoy_rate(const CoherentLink& link, const Interval& mean, const Interval& weak,
                                    const KeyTerms& terms);

// The mean photon number that solves (1 - mu) e^-mu = f h2(e_d)/(1 - h2(e_d)), background neglected; printed 0.54 for f
// = 1, 0.48 for f = 1.22 (from memory), agrees.
Interval optimal_mean_without_background(const Rational& flip, const Rational& error_correction_factor, Precision bits);

}  // namespace heraldgauge::reference::closed_form
