#include "bench/fock_elements.hpp"

#include <algorithm>
#include <cmath>

namespace heraldgauge::bench {

double factorial(int n) { return std::round(std::tgamma(n + 1.0)); }

double binomial(int n, int k) {
  return k < 0 || k > n ? 0 : std::round(factorial(n) / factorial(k) / factorial(n - k));
}

double second_quantised(int i, int j, int i_to, int j_to, double a, double b, double x) {
  if (i + j != i_to + j_to) return 0;
  double sum = 0;
  for (int p = std::max(0, i_to - j); p <= std::min(i, i_to); ++p) {
    sum += binomial(i, p) * binomial(j, i_to - p) * std::pow(a, p) * std::pow(x, i + i_to - 2 * p) *
           std::pow(b, j - i_to + p);
  }
  return std::sqrt(factorial(i_to) * factorial(j_to) / factorial(i) / factorial(j)) * sum;
}

}  // namespace heraldgauge::bench
