#include "bench/subset_sum.hpp"

#include <Eigen/Dense>
#include <bit>
#include <cmath>

namespace heraldgauge::bench {
namespace {

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

double determinant_subset_sum(const AlikeChain& chain) {
  const unsigned all = (1U << chain.stations) - 1;
  const double live = 1 - chain.dark;
  // Detectors c click everywhere, d stay silent; 2^N equal strings. H and V are independent without an analyser.
  double sum = 0;
  for (unsigned also_silent = 0; also_silent <= all; ++also_silent) {
    const int extra = std::popcount(also_silent);
    const double sign = extra % 2 == 0 ? 1 : -1;
    sum += sign * std::pow(live, chain.stations + extra) * no_click(chain, also_silent, all);
  }
  return std::pow(2, chain.stations) * sum * sum;
}

}  // namespace heraldgauge::bench
