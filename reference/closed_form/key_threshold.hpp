#pragma once
// Error rates up to which a key is left, asymptotic, one-way. The rate is q Q [1 - f h2(E) - h2(E)] (Shor and Preskill,
// Phys. Rev. Lett. 85, 441 (2000); Koashi and Preskill, Phys. Rev. Lett. 90, 057902 (2003)), from memory. Enclosures to
// about the precision less ten bits.

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference::closed_form {

// (1 + f) h2(E) = 1, f >= 1. f = 1: 11.0028 % is printed in arXiv:0712.1494 (read), agrees.
Interval bb84_threshold(const Rational& error_correction_factor, Precision bits);
// 1 + (1 - 3E/2) log2(1 - 3E/2) + (3E/2) log2(E/2) = 0 (Lo, Quantum Inf. Comput. 1, 81 (2001)); 12.6193 % printed in
// arXiv:0712.1494 (read), agrees.
Interval six_state_threshold(Precision bits);
// With random noise added before error correction: 2 c^3 = (1-c^2) ln((1+c)/(1-c)), c = 1 - 2E; 0.124 printed in
// quant-ph/0607018 (read), agrees.
Interval bb84_threshold_with_noise(Precision bits);
// (1-2E)^2 = E + (1-E) (1-c^2)/(2c) ln((1+c)/(1-c)), c = (1-2E)/(1-E); 14.11 % printed in arXiv:0712.1494 (read),
// agrees.
Interval six_state_threshold_with_noise(Precision bits);
// The older bound 1 - h2(E) - h2(2E) = 0; 7.5 % printed in quant-ph/0412070 (read): agrees only if that was truncated.
Interval bb84_older_threshold(Precision bits);

}  // namespace heraldgauge::reference::closed_form
