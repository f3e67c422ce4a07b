#pragma once
// after += weight E_H^T before E_V in one sector: where nearly all of the time goes. Blocks of 4 x 4 sums stay in
// registers. Each sum runs from many photons to few, from small terms to large.

#include <array>
#include <vector>

#include "fast/sectors.hpp"
#include "fast/station_operator.hpp"

namespace heraldgauge::fast {

// sum[j][i] = sum over k of a_k[i] b_k[j].
template <class T>
struct ProductBlock {
  static constexpr int tall = 4;
  static constexpr int wide = 4;  // the same as tall: a block on the diagonal is its own mirror image
  static_assert(tall - 1 <= over_read);
  std::array<std::array<T, tall>, wide> sum;

  ProductBlock() {
    for (auto& column : sum) column.fill(T(0.0));
  }
  // Only the first columns, or all.
  template <std::size_t Columns = wide>
  void add(const T* a, const T* b) {
    for (std::size_t i = 0; i < tall; ++i) {
      const T x = a[i];
      for (std::size_t j = 0; j < Columns; ++j) sum[j][i] += x * b[j];
    }
  }
  // take(i, j, sum); the bounds are constants, so that the sums need not leave their registers before.
  template <class Take>
  void each(const Take& take) const {
#pragma GCC unroll 4
    for (int j = 0; j < wide; ++j) {
#pragma GCC unroll 4
      for (int i = 0; i < tall; ++i) take(i, j, sum[static_cast<std::size_t>(j)][static_cast<std::size_t>(i)]);
    }
  }
};

template <class T>
class SectorProduct {
 public:
  // weight: of the next source, by its pairs. symmetric: exchanging a and b does not change `before`; where E_H is E_V
  // too, half of the second product follows from the other.
  void add(const TermFactors<T>& factors, const T* weight, bool symmetric, const Sectors<T>& before, Sectors<T>& after,
           int delta) {
    const bool halved = symmetric && factors.alike;
    in_ = before.cutoff() - delta;
    out_ = after.cutoff() - delta;
    stride_ = out_ + Block::tall;
    half_.resize(std::max(half_.size(), static_cast<std::size_t>((in_ + Block::wide) * stride_)));
    for (int b = 0; b <= in_; b += Block::wide) {
      for (int a_out = 0; a_out <= out_; a_out += Block::tall) sum_over_h(factors.h, before, delta, a_out, b);
    }
    for (int a_out = 0; a_out <= out_; a_out += Block::wide) {
      for (int b_out = halved ? a_out : 0; b_out <= out_ - a_out; b_out += Block::tall) {
        sum_over_v(factors.v, weight, halved && b_out > a_out, after, delta, a_out, b_out);
      }
    }
  }

 private:
  using Block = ProductBlock<T>;
  T* half(int b) { return half_.data() + b * stride_; }

  // half[b][a_out] = sum_a E_H(a, a_out) before(a, b): each column has one term more than the next.
  void sum_over_h(const Elements<T>& h, const Sectors<T>& before, int delta, int a_out, int b) {
    Block block;
    const T* h_rows = h.row(delta, 0) + a_out;
    const auto h_row = [&](int a) { return h_rows + a * (out_ + 1); };
    const auto from = [&](int a) { return before.row(delta, a) + b; };
    const int most = in_ - b;
    block.template add<1>(h_row(most), from(most));
    if (most >= 1) block.template add<2>(h_row(most - 1), from(most - 1));
    if (most >= 2) block.template add<3>(h_row(most - 2), from(most - 2));
    for (int a = most - 3; a >= 0; --a) block.add(h_row(a), from(a));
    block.each([&](int i, int j, const T& sum) { half(b + j)[a_out + i] = sum; });
  }

  // after(a_out, b_out) += weight(pairs) sum_b half[b][a_out] E_V(b, b_out)
  void sum_over_v(const Elements<T>& v, const T* weight, bool both, Sectors<T>& after, int delta, int a_out,
                  int b_out) {
    Block block;
    const T* v_rows = v.row(delta, 0) + b_out;
    const T* from = half(0) + a_out;
    for (int b = in_; b >= 0; --b) block.add(v_rows + b * (out_ + 1), from + b * stride_);
    const int most = out_ - a_out - b_out;
    const T* by_pairs = weight + delta + a_out + b_out;
    block.each([&](int i, int j, const T& sum) {
      if (i + j > most) return;
      const T weighed = by_pairs[i + j] * sum;
      after.row(delta, a_out + j)[b_out + i] += weighed;
      if (both) after.row(delta, b_out + i)[a_out + j] += weighed;
    });
  }

  int in_ = 0;
  int out_ = 0;
  int stride_ = 0;
  Buffer<T> half_;
};

}  // namespace heraldgauge::fast
