#pragma once
// Elements of a station's operator for one polarisation, in an unnormalised basis that needs no factorials:
// f(i',j'|i,j) is the coefficient of z^i' w^j' in (a z + x w)^i (x z + b w)^j, so that
// <i'j'| Gamma([[a,x],[x,b]]) |ij> = f sqrt(i'! j'! / (i! j!)). Sector Delta = i - i' >= 0; an element is addressed by
// the smaller index on either side, (a_in, a_out) = (i', j), and i = a_in + Delta, j' = a_out + Delta.
//
// A click of one detector while the other is silent is Gamma(M1) - Gamma(M0), M1 = 1 - K_silent, M0 = M1 - K_click.
// Adding one photon, Gamma(M) a_q^dag = sum_p M_pq a_p^dag Gamma(M), gives the difference D its own recurrence,
// D a_q^dag = sum_p a_p^dag (M1_pq D + (M1-M0)_pq Gamma(M0)), in which every term is non-negative, apart from one case
// (Overlap::larger) where one bounded subtraction is left and its loss is measured.

#include <vector>

#include <array>

#include "fast/lanes.hpp"
#include "fast/precision.hpp"
#include "fast/sectors.hpp"

namespace heraldgauge::fast {

// x0, the off-diagonal element of M0, against x1 of M1 (x1 >= 0): it is 0 for alike detectors, positive where the
// silent detector is the better one, negative where the clicking one is. An element depends on the sign of x0 as
// (sign)^Delta.
enum class Overlap { zero, positive, negative, larger };

template <class T>
struct ClickMode {
  T a1, b1, x1;                  // M1
  T a0, b0, x0;                  // M0, x0 without its sign
  T click_r, click_l;            // diagonal of M1 - M0
  T step;                        // |x1 - x0|
  T dark, two_minus_dark, live;  // of the clicking detector: d, 2 - d; of the silent one: 1 - d
};

// All sectors of one operator: rows a_in = 0..in-Delta, columns a_out = 0..out-Delta.
template <class T>
class Elements {
 public:
  Elements() = default;
  Elements(int in, int out) : in_(in), out_(out), data_(begin_of(deltas() + 1) + over_read, T(0.0)) {}
  int in() const { return in_; }
  int out() const { return out_; }
  int deltas() const { return in_ < out_ ? in_ : out_; }  // largest Delta
  T* row(int delta, int a_in) { return data_.data() + position(delta, a_in); }
  const T* row(int delta, int a_in) const { return data_.data() + position(delta, a_in); }

  Elements& operator+=(const Elements& other) {
    for (std::size_t i = 0; i < data_.size(); ++i) data_[i] += other.data_[i];
    return *this;
  }
  void add_scaled(const T& factor, const Elements& other) {
    for (std::size_t i = 0; i < data_.size(); ++i) data_[i] += factor * other.data_[i];
  }

 private:
  // sum of (in + 1 - k)(out + 1 - k) over k = 0..delta-1
  std::size_t begin_of(int delta) const {
    const int rows = in_ + 1;
    const int columns = out_ + 1;
    return static_cast<std::size_t>(rows * columns * delta - (rows + columns) * (delta * (delta - 1) / 2) +
                                    (delta - 1) * delta * (2 * delta - 1) / 6);
  }
  std::size_t position(int delta, int a_in) const {
    return begin_of(delta) + static_cast<std::size_t>(a_in) * static_cast<std::size_t>(out_ - delta + 1);
  }
  int in_ = 0;
  int out_ = 0;
  Buffer<T> data_;
};

// Gamma([[a,x],[x,b]]).
template <class T>
Elements<T> second_quantised(const T& a, const T& b, const T& x, int in, int out) {
  Elements<T> g(in, out);
  for (int delta = 0; delta <= g.deltas(); ++delta) {
    for (int i = 0; i <= in - delta; ++i) {
      T value = i == 0 ? T(delta == 0 ? 1.0 : 0.0) : a * g.row(delta, i - 1)[0];
      if (delta > 0) value += x * g.row(delta - 1, i)[0];
      g.row(delta, i)[0] = value;
    }
  }
  for (int delta = g.deltas(); delta >= 0; --delta) {
    for (int i = 0; i <= in - delta; ++i) {
      T* to = g.row(delta, i);
      const T* up = i > 0 && delta < g.deltas() ? g.row(delta + 1, i - 1) : nullptr;
      for (int j = 0; j < out - delta; ++j) to[j + 1] = up == nullptr ? b * to[j] : b * to[j] + x * up[j];
    }
  }
  return g;
}

// What one more photon adds to a difference D: K times the elements G.
template <class T>
struct Addend {
  const Elements<T>& g;
  T kr, kl, z;  // K = [[kr,z],[z,kl]]
};

// D with D |0> = 0 and D a_q^dag = sum_p a_p^dag (M_pq D + sum over the addends of K_pq G), M = [[a,x],[x,b]].
template <class T, std::size_t N>
Elements<T> difference(const T& a, const T& b, const T& x, const std::array<Addend<T>, N>& addends) {
  const int in = addends[0].g.in();
  const int out = addends[0].g.out();
  Elements<T> d(in, out);
  for (int delta = 0; delta <= d.deltas(); ++delta) {
    for (int i = 0; i <= in - delta; ++i) {
      const auto step = [&](const Elements<T>& from, const T& straight, const T& across) {
        const T value = i > 0 ? straight * from.row(delta, i - 1)[0] : T(0.0);
        return delta > 0 ? value + across * from.row(delta - 1, i)[0] : value;
      };
      T value = step(d, a, x);
      for (const Addend<T>& k : addends) value += step(k.g, k.kr, k.z);
      d.row(delta, i)[0] = value;
    }
  }
  for (int delta = d.deltas(); delta >= 0; --delta) {
    for (int i = 0; i <= in - delta; ++i) {
      const bool coupled = i > 0 && delta < d.deltas();
      T* to = d.row(delta, i);
      const T* up = coupled ? d.row(delta + 1, i - 1) : nullptr;
      std::array<const T*, N> from, from_up;
      for (std::size_t k = 0; k < N; ++k) {
        from[k] = addends[k].g.row(delta, i);
        from_up[k] = coupled ? addends[k].g.row(delta + 1, i - 1) : nullptr;
      }
      for (int j = 0; j < out - delta; ++j) {
        T sum = coupled ? b * to[j] + x * up[j] : b * to[j];
        for (std::size_t k = 0; k < N; ++k) {
          sum += coupled ? addends[k].kl * from[k][j] + addends[k].z * from_up[k][j] : addends[k].kl * from[k][j];
        }
        to[j + 1] = sum;
      }
    }
  }
  return d;
}

// Gamma(M0 + K) - Gamma(M0), given g = Gamma(M0), M0 + K = [[a,x],[x,b]], K = [[kr,z],[z,kl]].
template <class T>
Elements<T> difference(const Elements<T>& g, const T& a, const T& b, const T& x, const T& kr, const T& kl, const T& z) {
  return difference<T, 1>(a, b, x, {Addend<T>{g, kr, kl, z}});
}

// One detector clicks and the other stays silent, with the sign (-1)^Delta of a click at d left out. `loss` rises to
// the largest (sum of sizes) / (value) over the elements of sector 0: by how much a subtraction magnified their errors.
template <class T>
Elements<T> click_elements(const ClickMode<T>& mode, Overlap overlap, int in, int out, Rough<T>& loss) {
  const bool larger_overlap = overlap == Overlap::larger;
  const T zero(0.0);
  Elements<T> silent = second_quantised(mode.a0, mode.b0, larger_overlap ? mode.x1 : mode.x0, in, out);
  Elements<T> clicks =
      difference(silent, mode.a1, mode.b1, mode.x1, mode.click_r, mode.click_l, larger_overlap ? zero : mode.step);
  Elements<T> excess;  // Gamma(|M0|) less the same with x1 for |x0|
  if (larger_overlap) excess = difference(silent, mode.a0, mode.b0, mode.x0, zero, zero, mode.step);
  const bool flips = overlap == Overlap::negative || larger_overlap;
  for (int delta = 0; delta <= clicks.deltas(); ++delta) {
    const T weight = delta % 2 == 1 && flips ? mode.two_minus_dark : mode.dark;
    for (int i = 0; i <= in - delta; ++i) {
      T* value = clicks.row(delta, i);
      for (int j = 0; j <= out - delta; ++j) {
        const T less = larger_overlap ? excess.row(delta, i)[j] : zero;
        const T more = value[j] + weight * (silent.row(delta, i)[j] + less);
        value[j] = mode.live * (larger_overlap ? more - less : more);
        if (larger_overlap && delta == 0) loss = larger(loss, magnification(more, less));
      }
    }
  }
  return clicks;
}

}  // namespace heraldgauge::fast
