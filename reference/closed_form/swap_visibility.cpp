#include "reference/closed_form/swap_visibility.hpp"

#include <array>
#include <optional>
#include <vector>

#include "reference/optics/angles.hpp"

namespace heraldgauge::reference::closed_form {
namespace {

constexpr std::size_t order = 4;
using Matrix4 = std::array<std::array<Interval, order>, order>;

Matrix4 zero(Precision bits) {
  const Interval none(0L, bits);
  const std::array<Interval, order> row{none, none, none, none};
  return {row, row, row, row};
}

Matrix4 operator*(const Matrix4& a, const Matrix4& b) {
  Matrix4 product = zero(a[0][0].precision());
  for (std::size_t i = 0; i < order; ++i) {
    for (std::size_t j = 0; j < order; ++j) {
      for (std::size_t k = 0; k < order; ++k) product[i][j] += a[i][k] * b[k][j];
    }
  }
  return product;
}

Matrix4 transposed(const Matrix4& a) {
  Matrix4 result = a;
  for (std::size_t i = 0; i < order; ++i) {
    for (std::size_t j = 0; j < order; ++j) result[i][j] = a[j][i];
  }
  return result;
}

Interval minor_of_first_row(const Matrix4& a, std::size_t column) {
  std::array<std::size_t, 3> c{};
  for (std::size_t j = 0, next = 0; j < order; ++j) {
    if (j != column) c[next++] = j;
  }
  const auto two = [&](std::size_t p, std::size_t q) { return a[2][p] * a[3][q] - a[2][q] * a[3][p]; };
  return a[1][c[0]] * two(c[1], c[2]) - a[1][c[1]] * two(c[0], c[2]) + a[1][c[2]] * two(c[0], c[1]);
}

Interval determinant(const Matrix4& a) {
  Interval sum(0L, a[0][0].precision());
  for (std::size_t j = 0; j < order; ++j) {
    const Interval term = a[0][j] * minor_of_first_row(a, j);
    sum = j % 2 == 0 ? sum + term : sum - term;
  }
  return sum;
}

// Four detectors as rows over four modes; bit i of `silent` for detector i.
struct Reading {
  Matrix4 rows;
  Interval registering;
};

// 1 - sum over silent detectors of eta r r^T.
Matrix4 passing(const Reading& reading, unsigned silent) {
  const Precision bits = reading.registering.precision();
  Matrix4 result = zero(bits);
  for (std::size_t i = 0; i < order; ++i) result[i][i] = Interval(1L, bits);
  for (std::size_t detector = 0; detector < order; ++detector) {
    if ((silent >> detector & 1U) == 0) continue;
    for (std::size_t i = 0; i < order; ++i) {
      for (std::size_t j = 0; j < order; ++j) {
        result[i][j] -= reading.registering * reading.rows[detector][i] * reading.rows[detector][j];
      }
    }
  }
  return result;
}

class Swap {
 public:
  explicit Swap(const SwapLink& link)
      : link_(link), bits_(link.mean_pairs.precision()), one_(1L, bits_), coupling_(zero(bits_)) {
    // Outer modes A_H, A_V, B_H, B_V; inner a_H, a_V, b_H, b_V; each source in A_H a_V - A_V a_H.
    for (const std::size_t h : {std::size_t{0}, std::size_t{2}}) {
      coupling_[h][h + 1] = one_;
      coupling_[h + 1][h] = -one_;
    }
  }

  // Sum over the silent subsets of the clicking detectors, at both places.
  Interval probability(const Reading& outer, unsigned outer_clicks, unsigned outer_silent) const {
    constexpr unsigned e_h = 1, e_v = 2, f_h = 4, f_v = 8;
    const Reading centre{centre_rows(), registering(link_.eta_centre)};
    Interval total(0L, bits_);
    for (const unsigned inner : {0U, e_h, f_v, e_h | f_v}) {
      for (unsigned subset = outer_clicks;; subset = (subset - 1) & outer_clicks) {
        const Interval term = silent_set(outer, subset | outer_silent, centre, inner | e_v | f_h);
        const bool even = (__builtin_popcount(subset) + __builtin_popcount(inner)) % 2 == 0;
        total = even ? total + term : total - term;
        if (subset == 0) break;
      }
    }
    return total;
  }

  Reading outer(const Rational& left_deg, const Rational& right_deg) const {
    Reading reading{zero(bits_), registering(link_.eta_outer)};
    for (const std::size_t end : {std::size_t{0}, std::size_t{2}}) {
      const Rational& deg = end == 0 ? left_deg : right_deg;
      reading.rows[end][end] = reading.rows[end + 1][end + 1] = cosine_of_degrees(deg, bits_);
      reading.rows[end][end + 1] = sine_of_degrees(deg, bits_);
      reading.rows[end + 1][end] = -sine_of_degrees(deg, bits_);
    }
    return reading;
  }

 private:
  Interval registering(const Interval& eta) const {
    return link_.dark_model == model::DarkModel::thermal ? eta * (one_ - link_.dark) : eta;
  }

  // e = (a + b)/sqrt2, f = (a - b)/sqrt2, then H and V apart.
  Matrix4 centre_rows() const {
    const Interval half = square_root(Interval(Rational(1, 2), bits_));
    Matrix4 rows = zero(bits_);
    for (const std::size_t polarisation : {std::size_t{0}, std::size_t{1}}) {
      rows[polarisation][polarisation] = rows[polarisation][2 + polarisation] = half;
      rows[2 + polarisation][polarisation] = half;
      rows[2 + polarisation][2 + polarisation] = -half;
    }
    return rows;
  }

  Interval silent_set(const Reading& outer, unsigned outer_silent, const Reading& centre, unsigned inner_silent) const {
    const Matrix4 chain =
        passing(outer, outer_silent) * coupling_ * passing(centre, inner_silent) * transposed(coupling_);
    Matrix4 matrix = zero(bits_);
    for (std::size_t i = 0; i < order; ++i) {
      for (std::size_t j = 0; j < order; ++j) matrix[i][j] = -link_.mean_pairs * chain[i][j];
      matrix[i][i] += one_ + link_.mean_pairs;
    }
    const auto count = static_cast<unsigned long>(__builtin_popcount(outer_silent) + __builtin_popcount(inner_silent));
    return power(one_ - link_.dark, count) / determinant(matrix);
  }

  const SwapLink& link_;
  Precision bits_;
  Interval one_;
  Matrix4 coupling_;
};

Interval coincidence(const SwapLink& link, OuterReading reading, const Rational& left_deg, const Rational& right_deg) {
  constexpr unsigned both_plus = 1 | 4, both_cross = 2 | 8;
  const Swap swap(link);
  return swap.probability(swap.outer(left_deg, right_deg), both_plus,
                          reading == OuterReading::exclusive ? both_cross : 0);
}

}  // namespace

Extremes<Interval> swap_coincidence(const SwapLink& link, OuterReading reading, const Rational& left_deg) {
  return {coincidence(link, reading, left_deg, left_deg + 90), coincidence(link, reading, left_deg, left_deg)};
}

Interval swap_herald(const SwapLink& link) {
  const Swap swap(link);
  return swap.probability(swap.outer(0, 0), 0, 0);
}

Interval swap_visibility_weak(const Interval& mean_pairs) {
  const Precision bits = mean_pairs.precision();
  const Interval one(1L, bits);
  return square(one + mean_pairs) / (one + mean_pairs * 10L + square(mean_pairs) * 17L);
}

Interval swap_visibility_lossless(const Interval& mean_pairs) {
  const Interval one(1L, mean_pairs.precision());
  return one / (one + mean_pairs * 4L + square(mean_pairs) * 2L);
}

}  // namespace heraldgauge::reference::closed_form
