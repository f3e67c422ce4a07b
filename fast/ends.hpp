#pragma once
// What an end sees of a source's photons: E_Delta(a,b) = sum_p W(p, n-p) U_n(h,p) U_n(h-Delta,p), with h = a+Delta, n =
// a+b+Delta, W the probability of the outcome when p photons go to plus and n-p to cross.

#include <array>
#include <vector>

#include "fast/precision.hpp"
#include "fast/rotation.hpp"

namespace heraldgauge::fast {

// The outcomes 00, 01, 10, 11 are numbered 2*plus + cross. A recorded bit gets half of the double clicks. The contrast
// of 10 is W(p, n-p) - W(0, n), what is left of it when the part that sees no polarisation is taken off.
enum EndOutcome {
  silent_both = 0,
  only_cross = 1,
  only_plus = 2,
  both_click = 3,
  bit_plus = 4,
  bit_cross = 5,
  contrast = 6
};

template <class T>
struct EndMode {
  std::array<T, 2> registering, missing, dark, live;  // plus, cross; registering includes the arm
};

// Click and no-click probabilities of one detector for 0..largest photons; no subtraction.
template <class T>
struct ClickTable {
  std::vector<T> silent;  // (1-d) s^p
  std::vector<T> click;   // d + (1-d)(1-s^p)
  std::vector<T> caught;  // 1 - s^p
  T dark, live;           // d, 1-d
};

template <class T>
ClickTable<T> click_table(const EndMode<T>& end, std::size_t detector, int largest) {
  ClickTable<T> table{{}, {}, {}, end.dark[detector], end.live[detector]};
  T passed(1.0);  // s^p
  T caught(0.0);  // 1 - s^p
  for (int p = 0; p <= largest; ++p) {
    table.silent.push_back(end.live[detector] * passed);
    table.click.push_back(end.dark[detector] + end.live[detector] * caught);
    table.caught.push_back(caught);
    caught = caught + passed * end.registering[detector];
    passed = passed * end.missing[detector];
  }
  return table;
}

template <class T>
T outcome_weight(const ClickTable<T>& plus, const ClickTable<T>& cross, int outcome, int p, int q) {
  const auto i = static_cast<std::size_t>(p);
  const auto j = static_cast<std::size_t>(q);
  const T half(0.5);
  switch (outcome) {
    case silent_both:
      return plus.silent[i] * cross.silent[j];
    case only_cross:
      return plus.silent[i] * cross.click[j];
    case only_plus:
      return plus.click[i] * cross.silent[j];
    case both_click:
      return plus.click[i] * cross.click[j];
    case bit_plus:
      return plus.click[i] * (cross.silent[j] + half * cross.click[j]);
    case bit_cross:
      return cross.click[j] * (plus.silent[i] + half * plus.click[i]);
    // click+(p) silent(n-p) - d silent(n), with silent(n) = silent(n-p) s_cross^p
    default:
      return cross.silent[j] * (plus.live * plus.caught[i] + plus.dark * cross.caught[i]);
  }
}

// One value for each (Delta, a, b) with a + b + Delta <= cutoff and Delta <= deltas: rows a = 0..cutoff-Delta, each of
// cutoff-Delta-a+1 entries b.
template <class T>
class Sectors {
 public:
  Sectors() = default;
  Sectors(int cutoff, int deltas) : cutoff_(cutoff), deltas_(deltas) {
    std::size_t size = 0;
    for (int delta = 0; delta <= deltas; ++delta) {
      offset_.push_back(size);
      size += static_cast<std::size_t>(cutoff - delta + 1) * static_cast<std::size_t>(cutoff - delta + 2) / 2;
    }
    data_.assign(size, T(0.0));
  }
  int cutoff() const { return cutoff_; }
  int deltas() const { return deltas_; }
  T* row(int delta, int a) { return data_.data() + position(delta, a); }
  const T* row(int delta, int a) const { return data_.data() + position(delta, a); }
  std::vector<T>& data() { return data_; }
  const std::vector<T>& data() const { return data_; }

 private:
  std::size_t position(int delta, int a) const {
    const int width = cutoff_ - delta + 1;
    return offset_[static_cast<std::size_t>(delta)] + static_cast<std::size_t>(a * width - a * (a - 1) / 2);
  }
  int cutoff_ = -1;
  int deltas_ = -1;
  std::vector<std::size_t> offset_;
  std::vector<T> data_;
};

// The end's elements for one outcome and all sectors, normalised.
template <class T>
Sectors<T> end_elements(const EndMode<T>& end, const Rotation& rotation, int outcome, int cutoff, int deltas) {
  const ClickTable<T> plus = click_table(end, 0, cutoff);
  const ClickTable<T> cross = click_table(end, 1, cutoff);
  Sectors<T> elements(cutoff, deltas);
  std::vector<T> weight(static_cast<std::size_t>(cutoff) + 1);
  for (int n = 0; n <= cutoff; ++n) {
    for (int p = 0; p <= n; ++p) {
      weight[static_cast<std::size_t>(p)] = outcome_weight(plus, cross, outcome, p, n - p);
    }
    for (int delta = 0; delta <= deltas && delta <= n; ++delta) {
      for (int a = 0; a <= n - delta; ++a) {
        const auto* upper = rotation.row(Table<T>{}, n, a + delta);
        const auto* lower = rotation.row(Table<T>{}, n, a);
        T sum(0.0);
        for (int p = 0; p <= n; ++p) sum += weight[static_cast<std::size_t>(p)] * T(upper[p] * lower[p]);
        elements.row(delta, a)[n - delta - a] = sum;
      }
    }
  }
  return elements;
}

// Ends at 0 or 90 degrees see photon numbers as they are: only sector 0, no sum.
template <class T>
Sectors<T> aligned_end_elements(const EndMode<T>& end, const Rotation& rotation, int outcome, int cutoff) {
  const ClickTable<T> plus = click_table(end, 0, cutoff);
  const ClickTable<T> cross = click_table(end, 1, cutoff);
  const bool exchanged = rough(rotation.row(Table<T>{}, 1, 1)[1]) == 0;
  Sectors<T> elements(cutoff, 0);
  for (int a = 0; a <= cutoff; ++a) {
    for (int b = 0; b <= cutoff - a; ++b) {
      elements.row(0, a)[b] = outcome_weight(plus, cross, outcome, exchanged ? b : a, exchanged ? a : b);
    }
  }
  return elements;
}

}  // namespace heraldgauge::fast
