#include "bench/baselines.hpp"

#include <Eigen/Dense>

#include <cmath>
#include <cstddef>
#include <vector>

namespace heraldgauge::bench {
namespace {

double binomial(int n, int k) {
  if (k < 0 || k > n) return 0;
  double product = 1;
  for (int i = 1; i <= k; ++i) product = product * (n - k + i) / i;
  return product;
}

// <ij| Gamma([[a,x],[x,b]]) |ij>.
double diagonal_element(int i, int j, double a, double b, double x) {
  double sum = 0;
  for (int p = 0; p <= i; ++p) {
    if (j - i + p < 0) continue;
    sum += binomial(i, p) * binomial(j, i - p) * std::pow(a, p) * std::pow(x, 2 * (i - p)) * std::pow(b, j - i + p);
  }
  return sum;
}

// One detector of a polarisation clicks, the other is silent.
std::vector<double> click_table(const AlikeChain& chain, int pairs) {
  const double k = chain.efficiency * chain.transmittance / 2;
  const double live = 1 - chain.dark;
  std::vector<double> table;
  for (int i = 0; i <= pairs; ++i) {
    for (int j = 0; j <= pairs; ++j) {
      table.push_back(live * diagonal_element(i, j, 1 - k, 1 - k, k) -
                      live * live * diagonal_element(i, j, 1 - 2 * k, 1 - 2 * k, 0));
    }
  }
  return table;
}

class NestedSum {
 public:
  NestedSum(const AlikeChain& chain, int pairs) : chain_(chain), pairs_(pairs), click_(click_table(chain, pairs)) {}

  double from(int source, int left_h, int left_v) const {
    double sum = 0;
    for (int h = 0; h <= pairs_; ++h) {
      for (int v = 0; h + v <= pairs_; ++v) {
        const double weight = std::pow(1 - chain_.lam, 2) * std::pow(chain_.lam, h + v);
        const double station = source == 0 ? 1 : 2 * element(left_h, h) * element(left_v, v);
        sum += weight * station * (source == chain_.stations ? 1 : from(source + 1, h, v));
      }
    }
    return sum;
  }

 private:
  double element(int i, int j) const { return click_[static_cast<std::size_t>(i * (pairs_ + 1) + j)]; }
  AlikeChain chain_;
  int pairs_;
  std::vector<double> click_;
};

// What each subset of silent detectors does to the modes of one polarisation: 1 - K on the arms, in source order L_0
// R_0 L_1 ...
Eigen::MatrixXd silent_matrix(const AlikeChain& chain, unsigned silent_c, unsigned silent_d) {
  const int arms = 2 * (chain.stations + 1);
  Eigen::MatrixXd x = Eigen::MatrixXd::Identity(arms, arms);
  const double k = chain.efficiency * chain.transmittance / 2;
  for (int station = 0; station < chain.stations; ++station) {
    const int r = 2 * station + 1;
    const int l = r + 1;
    for (const double sign : {1.0, -1.0}) {
      if (((sign > 0 ? silent_c : silent_d) >> station & 1U) == 0) continue;
      x(r, r) -= k;
      x(l, l) -= k;
      x(r, l) -= sign * k;
      x(l, r) -= sign * k;
    }
  }
  return x;
}

// prod (1-lam) / sqrt(det) of the Gaussian state of one polarisation: pairs couple the two arms of a source.
double no_click(const AlikeChain& chain, unsigned silent_c, unsigned silent_d) {
  const int arms = 2 * (chain.stations + 1);
  Eigen::MatrixXd pairs = Eigen::MatrixXd::Zero(arms, arms);
  for (int k = 0; k <= chain.stations; ++k) pairs(2 * k, 2 * k + 1) = pairs(2 * k + 1, 2 * k) = std::sqrt(chain.lam);
  const Eigen::MatrixXd x = silent_matrix(chain, silent_c, silent_d);
  const double det = (Eigen::MatrixXd::Identity(arms, arms) - pairs * x * pairs * x).determinant();
  return std::pow(1 - chain.lam, chain.stations + 1) / std::sqrt(det);
}

}  // namespace

double number_conserving_sum(const AlikeChain& chain, int pairs) { return NestedSum(chain, pairs).from(0, 0, 0); }

double determinant_subset_sum(const AlikeChain& chain) {
  const unsigned all = (1U << chain.stations) - 1;
  const double live = 1 - chain.dark;
  // Detectors c click everywhere, d stay silent; 2^N equal strings. H and V are independent without an analyser.
  double sum = 0;
  for (unsigned also_silent = 0; also_silent <= all; ++also_silent) {
    const int extra = __builtin_popcount(also_silent);
    const double sign = extra % 2 == 0 ? 1 : -1;
    sum += sign * std::pow(live, chain.stations + extra) * no_click(chain, also_silent, all);
  }
  return std::pow(2, chain.stations) * sum * sum;
}

}  // namespace heraldgauge::bench
