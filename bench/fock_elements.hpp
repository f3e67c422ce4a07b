#pragma once
// Matrix elements between photon numbers, as the textbook formulas have them.

namespace heraldgauge::bench {

double factorial(int n);
double binomial(int n, int k);  // 0 outside 0 <= k <= n

// <i' j'| Gamma([[a,x],[x,b]]) |i j>, the second quantisation of a 2 x 2 matrix; 0 unless i' + j' = i + j.
double second_quantised(int i, int j, int i_to, int j_to, double a, double b, double x);

}  // namespace heraldgauge::bench
