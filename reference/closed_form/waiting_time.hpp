#pragma once

#include "reference/arithmetic/field.hpp"

namespace heraldgauge::reference::closed_form {

// Mean number of trials until all of n independent links, each succeeding with probability p in (0,1] a trial and kept,
// are there: Bernardes, Praxmeyer, van Loock, Phys. Rev. A 83, 012323 (2011), from memory, verified. The printed
// alternating sum
//   Z_n = sum_j (-1)^(j+1) C(n,j) / (1 - (1-p)^j)
// is without a correct digit in binary64 from about n = 64 on; here the terms are positive: conditioning on the links
// that still wait after one trial, Z_n (1 - q^n) = 1 + sum_{j=1}^{n-1} C(n,j) p^(n-j) q^j Z_j, q = 1 - p. Cost n^2.
template <class Number>
Number mean_waiting_time(const Field<Number>& field, const Number& p, unsigned n);

// Approximations in use: (3/2)^log2(n) / p (n a power of two), an upper bound in essence; H_n / p for p -> 0;
// 1/2 + H_n / (-ln(1-p)), between Eisenberg's bounds H_n/(-ln(1-p)) and 1 + that (Stat. Probab. Lett. 78, 135 (2008)).
template <class Number>
Number three_halves_rule(const Field<Number>& field, const Number& p, unsigned log2_n);
template <class Number>
Number harmonic_rule(const Field<Number>& field, const Number& p, unsigned n);
Interval half_shifted_rule(const Interval& p, unsigned n);

}  // namespace heraldgauge::reference::closed_form
