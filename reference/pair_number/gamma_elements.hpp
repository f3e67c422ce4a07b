#pragma once
// Matrix elements of Gamma(M), the second quantisation of a symmetric 2x2 matrix M = [[a, x], [x, b]] on two modes.
//
// Between |i, j> and <i', j'| with i - i' = D >= 0, written with alpha = i' and beta = j:
//   <alpha, beta + D| Gamma |alpha + D, beta> = sqrt(alpha! (beta+D)! / ((alpha+D)! beta!)) g_D(alpha, beta),
// where g_D(alpha, beta) is the coefficient of u^alpha w^(beta+D) in (a u + x w)^(alpha+D) (x u + b w)^beta. Taking one
// factor out gives the recurrence used here, which only adds terms of one sign where a, b >= 0 and x is of one sign:
//   g_D(0, beta) = x^D b^beta,
//   g_D(alpha, beta) = a g_D(alpha-1, beta) + x g_{D-1}(alpha, beta)                       for D >= 1,
//   g_0(alpha, beta) = a g_0(alpha-1, beta) + x (beta/alpha) g_1(alpha-1, beta-1),
// the last by the symmetry of Gamma. a, b, x may be polynomials (count_algebra.hpp).

#include <functional>

#include "reference/pair_number/count_algebra.hpp"

namespace heraldgauge::reference::pair_number {

struct ModePair {
  Polynomial a, b, x;
  // What stands for x in the step from D = 1 to D = 0; x itself unless a power of i is carried outside (end_operator).
  Polynomial x_down;
};

// Which elements: alpha + D <= first, beta + D <= second, alpha + beta + D <= total, D <= sectors.
struct Extent {
  long first;
  long second;
  long total;
  long sectors;
};

// Calls visit(D, alpha, beta, element) once for each, alpha rising; the element's coefficients are valid during the
// call.
using ElementVisitor = std::function<void(long sector, long alpha, long beta, const Interval* element)>;
void for_each_gamma_element(const CountAlgebra& algebra, const ModePair& modes, const Extent& extent,
                            const ElementVisitor& visit);

}  // namespace heraldgauge::reference::pair_number
