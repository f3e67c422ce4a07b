#pragma once
// A vector at the right end, contracted with what the end sees.

#include <vector>

#include "fast/ends.hpp"

namespace heraldgauge::fast {

// Numbers of one pairing: the value is right to within count * unit * magnitude, and lies at most `tail` below the
// exact one.
template <class T>
struct PairedSum {
  T value = T(0.0);
  Rough<T> magnitude = Rough<T>(0.0);
  Rough<T> tail = Rough<T>(0.0);
};

// An end's elements in the basis of the stations, which needs no factorials.
template <class T>
void raise(Sectors<T>& elements) {
  for (int delta = 1; delta <= elements.deltas(); ++delta) {
    const auto* factor = raising_factors(Table<T>{}, delta);
    for (int a = 0; a <= elements.cutoff() - delta; ++a) {
      T* row = elements.row(delta, a);
      for (int b = 0; b <= elements.cutoff() - delta - a; ++b) row[b] = row[b] * T(factor[a] * factor[b]);
    }
  }
}

// What the right end sees at an angle; only sector 0 unless `sectors`.
template <class T>
Sectors<T> right_elements(const EndTables<T>& end, const Rotation& rotation, int outcome, int cutoff, int deltas,
                          bool majorant = false) {
  if (deltas == 0 && rotation.aligned()) return aligned_end_elements(end, rotation, outcome, cutoff);
  Sectors<T> elements = end_elements(end, rotation, outcome, cutoff, deltas);
  if (majorant) make_majorant(elements);
  raise(elements);
  return elements;
}

// Sector 0 with H and V exchanged.
template <class T>
Sectors<T> transposed(const Sectors<T>& sectors) {
  Sectors<T> result(sectors.cutoff(), 0);
  for (int a = 0; a <= sectors.cutoff(); ++a) {
    for (int b = 0; b <= sectors.cutoff() - a; ++b) result.row(0, a)[b] = sectors.row(0, b)[a];
  }
  return result;
}

template <class T>
T sum_of_all(const Sectors<T>& sectors) {
  T sum(0.0);
  for (int a = sectors.cutoff(); a >= 0; --a) {
    for (int b = sectors.cutoff() - a; b >= 0; --b) sum += sectors.row(0, a)[b];
  }
  return sum;
}

// Adds the contraction with a right end: the value, and the largest that all its terms can come to in size. By Cauchy
// and Schwarz the terms of sector Delta are at most the geometric mean of those of sector 0 with h >= Delta and with v
// >= Delta at the last source.
template <class T>
class Contraction {
 public:
  void add(const Sectors<T>& left, const Sectors<T>& right, bool alternating, PairedSum<T>& sum) {
    const int cutoff = left.cutoff();
    const int deltas = std::min(left.deltas(), right.deltas());
    if (deltas == 0) {
      const T value = all_of_sector(left, right, 0);
      sum.value += value;
      sum.magnitude += rough(value);
      return;
    }
    by_h_.assign(static_cast<std::size_t>(cutoff) + 1, R(0.0));
    by_v_.assign(static_cast<std::size_t>(cutoff) + 1, R(0.0));
    for (int delta = deltas; delta > 0; --delta) {
      sum.value += all_of_sector(left, right, delta) * T(alternating && delta % 2 == 1 ? -2.0 : 2.0);
    }
    sum.value += sector_zero(left, right);
    R from_h(0.0);
    R from_v(0.0);
    for (int n = cutoff; n >= 0; --n) {
      from_h += by_h_[static_cast<std::size_t>(n)];
      from_v += by_v_[static_cast<std::size_t>(n)];
      if (n == 0) sum.magnitude += from_h;
      if (n > 0 && n <= deltas) sum.magnitude += from_h + from_v;
    }
  }

 private:
  using R = Rough<T>;

  static T all_of_sector(const Sectors<T>& left, const Sectors<T>& right, int delta) {
    const int width = left.cutoff() - delta + 1;
    const T* x = left.row(delta, 0);
    const T* y = right.row(delta, 0);
    return interleaved_sum<T>(width * (width + 1) / 2, [&](int i) { return x[i] * y[i]; });
  }

  T sector_zero(const Sectors<T>& left, const Sectors<T>& right) {
    T sum(0.0);
    for (int a = left.cutoff(); a >= 0; --a) {
      const T* x = left.row(0, a);
      const T* y = right.row(0, a);
      T row(0.0);
      for (int b = left.cutoff() - a; b >= 0; --b) {
        const T term = x[b] * y[b];
        row += term;
        by_v_[static_cast<std::size_t>(b)] += rough(term);
      }
      by_h_[static_cast<std::size_t>(a)] = rough(row);
      sum += row;
    }
    return sum;
  }

  Buffer<R> by_h_, by_v_;  // terms of sector 0 by the photons of one polarisation
};

}  // namespace heraldgauge::fast
