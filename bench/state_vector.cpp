#include "bench/state_vector.hpp"

#include <Eigen/Dense>
#include <cmath>
#include <stdexcept>

#include "bench/fock_elements.hpp"

namespace heraldgauge::bench {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

// <c d| beam splitter |r l> with c = (R + L)/sqrt2, d = (R - L)/sqrt2.
double splitter_element(int r, int l, int c, int d) {
  if (r + l != c + d) return 0;
  double sum = 0;
  for (int p = 0; p <= r; ++p) {  // p photons of R leave by c
    const int q = c - p;          // and q of L
    if (q < 0 || q > l) continue;
    sum += binomial(r, p) * binomial(l, q) * ((l - q) % 2 == 0 ? 1 : -1);
  }
  return sum * std::sqrt(factorial(c) * factorial(d) / factorial(r) / factorial(l)) / std::pow(2, (r + l) / 2.0);
}

// <n - lost| A |n> of the Kraus operator of `lost` photons.
double loss_element(int n, int lost, double transmittance) {
  if (lost > n) return 0;
  return std::sqrt(binomial(n, lost) * std::pow(transmittance, n - lost) * std::pow(1 - transmittance, lost));
}

// The eight modes of two sources. Amplitudes of one polarisation are independent of the other's until clicks are
// counted, but the state vector holds all modes, as a circuit simulator does: rows are the outer modes L_0 H, R_1 H,
// L_0 V, R_1 V and the station's H modes, columns the station's V modes.
class Circuit {
 public:
  Circuit(const AlikeChain& chain, int photons)
      : chain_(chain), in_(photons + 1), out_(2 * photons + 1), outer_(in_ * in_ * in_ * in_) {
    splitter_ = MatrixXd(out_ * out_, in_ * in_);
    for (int c = 0; c < out_; ++c)
      for (int d = 0; d < out_; ++d)
        for (int r = 0; r < in_; ++r)
          for (int l = 0; l < in_; ++l) splitter_(c * out_ + d, r * in_ + l) = splitter_element(r, l, c, d);
  }

  double herald() const {
    double sum = 0;
    for (int r_h = 0; r_h < in_; ++r_h)
      for (int l_h = 0; l_h < in_; ++l_h)
        for (int r_v = 0; r_v < in_; ++r_v)
          for (int l_v = 0; l_v < in_; ++l_v) sum += branch(r_h, l_h, r_v, l_v);
    return sum;
  }

 private:
  // The part of the herald with these photons lost in the arms R_0 and L_1.
  double branch(int r_h, int l_h, int r_v, int l_v) const {
    const MatrixXd before = after_loss(r_h, l_h, r_v, l_v);
    double sum = 0;
    for (int outer = 0; outer < outer_; ++outer) {
      const MatrixXd after = splitter_ * before.middleRows(outer * in_ * in_, in_ * in_) * splitter_.transpose();
      sum += 2 * click_.dot(after.cwiseAbs2() * click_);
    }
    return sum;
  }

  MatrixXd after_loss(int r_h, int l_h, int r_v, int l_v) const {
    MatrixXd state = MatrixXd::Zero(outer_ * in_ * in_, in_ * in_);
    for (int h0 = r_h; h0 < in_; ++h0)
      for (int h1 = l_h; h1 < in_; ++h1)
        for (int v0 = r_v; v0 < in_; ++v0)
          for (int v1 = l_v; v1 < in_; ++v1) {
            const int outer = ((h0 * in_ + h1) * in_ + v0) * in_ + v1;
            state(outer * in_ * in_ + (h0 - r_h) * in_ + h1 - l_h, (v0 - r_v) * in_ + v1 - l_v) =
                source(h0 + v0) * source(h1 + v1) * loss_element(h0, r_h, chain_.transmittance) *
                loss_element(h1, l_h, chain_.transmittance) * loss_element(v0, r_v, chain_.transmittance) *
                loss_element(v1, l_v, chain_.transmittance);
          }
    return state;
  }

  double source(int pairs) const { return (1 - chain_.lam) * std::pow(chain_.lam, pairs / 2.0); }

  // Probability that c clicks and d is silent, by the photons in both; the other accepted pattern is alike.
  VectorXd click_vector() const {
    VectorXd click(out_ * out_);
    const auto silent = [&](int n) { return (1 - chain_.dark) * std::pow(1 - chain_.efficiency, n); };
    for (int c = 0; c < out_; ++c)
      for (int d = 0; d < out_; ++d) click(c * out_ + d) = (1 - silent(c)) * silent(d);
    return click;
  }

  AlikeChain chain_;
  int in_, out_, outer_;
  MatrixXd splitter_;
  VectorXd click_ = click_vector();
};

}  // namespace

double state_vector_herald(const AlikeChain& chain, int photons) {
  if (chain.stations != 1) throw std::runtime_error("the state vector is written for one station");
  return Circuit(chain, photons).herald();
}

}  // namespace heraldgauge::bench
