#pragma once
// Numbers over (Delta, a, b): one value for each with a + b + Delta <= cutoff and Delta <= deltas.

#include <algorithm>

#include "fast/pool.hpp"

namespace heraldgauge::fast {

// Entries behind the last row that a block of the product may read (and never uses).
inline constexpr int over_read = 3;

// Rows a = 0..cutoff-Delta, each of cutoff-Delta-a+1 entries b.
template <class T>
class Sectors {
 public:
  Sectors() = default;
  Sectors(int cutoff, int deltas) : cutoff_(cutoff), deltas_(deltas), data_(begin_of(deltas + 1), T(0.0)) {}
  int cutoff() const { return cutoff_; }
  int deltas() const { return deltas_; }
  T* row(int delta, int a) { return data_.data() + position(delta, a); }
  const T* row(int delta, int a) const { return data_.data() + position(delta, a); }
  Buffer<T>& data() { return data_; }
  const Buffer<T>& data() const { return data_; }
  // All zero, with another shape; keeps its memory.
  void reset(int cutoff, int deltas) {
    cutoff_ = cutoff;
    deltas_ = deltas;
    data_.assign(begin_of(deltas + 1), T(0.0));
  }

 private:
  static int tetrahedron(int n) { return n * (n + 1) * (n + 2) / 6; }
  std::size_t begin_of(int delta) const {
    return static_cast<std::size_t>(tetrahedron(cutoff_ + 1) - tetrahedron(cutoff_ + 1 - delta));
  }
  std::size_t position(int delta, int a) const {
    return begin_of(delta) + static_cast<std::size_t>(a * (cutoff_ - delta + 1) - a * (a - 1) / 2);
  }
  int cutoff_ = -1;
  int deltas_ = -1;
  Buffer<T> data_;
};

}  // namespace heraldgauge::fast
