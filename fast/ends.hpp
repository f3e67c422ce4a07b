#pragma once
// What an end sees of a source's photons: E_Delta(a,b) = sum_p W(p, n-p) U_n(h,p) U_n(h-Delta,p), with h = a+Delta, n =
// a+b+Delta, W the probability of the outcome when p photons go to plus and n-p to cross.

#include <array>
#include <vector>

#include "fast/demand.hpp"
#include "fast/dot.hpp"
#include "fast/precision.hpp"
#include "fast/rotation.hpp"
#include "fast/sectors.hpp"

namespace heraldgauge::fast {

// The outcomes 00, 01, 10, 11 are numbered 2*plus + cross. A recorded bit gets half of the double clicks. The contrast
// of 10 is W(p, n-p) - W(0, n), what is left of it when the part that sees no polarisation is taken off.
// Other combinations of what a free pattern asks are free_end(plus, cross).
enum EndOutcome {
  silent_both = 0,
  only_cross = 1,
  only_plus = 2,
  both_click = 3,
  bit_plus = 4,
  bit_cross = 5,
  contrast = 6,
  first_free = 7
};

inline int free_end(Demand plus, Demand cross) {
  return first_free + 3 * static_cast<int>(plus) + static_cast<int>(cross);
}
inline Demand demand_of_plus(int outcome) { return static_cast<Demand>((outcome - first_free) / 3); }
inline Demand demand_of_cross(int outcome) { return static_cast<Demand>((outcome - first_free) % 3); }

template <class T>
struct EndMode {
  std::array<T, 2> registering, missing, dark, live;  // plus, cross; registering includes the arm
};

// Click and no-click probabilities of one detector for 0..largest photons; no subtraction.
template <class T>
struct ClickTable {
  Buffer<T> silent;  // (1-d) s^p
  Buffer<T> click;   // d + (1-d)(1-s^p)
  Buffer<T> caught;  // 1 - s^p
  T dark, live;      // d, 1-d

  ClickTable(const EndMode<T>& end, std::size_t detector, int largest)
      : dark(end.dark[detector]), live(end.live[detector]) {
    const auto size = static_cast<std::size_t>(largest) + 1;
    for (Buffer<T>* table : {&silent, &click, &caught}) table->reserve(size);
    T passed(1.0);  // s^p
    T some(0.0);    // 1 - s^p
    for (int p = 0; p <= largest; ++p) {
      silent.push_back(live * passed);
      click.push_back(dark + live * some);
      caught.push_back(some);
      some = some + passed * end.registering[detector];
      passed = passed * end.missing[detector];
    }
  }

  T meets(Demand demand, std::size_t photons) const {
    if (demand == Demand::anything) return T(1.0);
    return demand == Demand::silent ? silent[photons] : click[photons];
  }
};

// Both detectors of an end.
template <class T>
struct EndTables {
  ClickTable<T> plus, cross;
  EndTables(const EndMode<T>& end, int largest) : plus(end, 0, largest), cross(end, 1, largest) {}
};

template <class T>
T outcome_weight(const EndTables<T>& end, int outcome, int p, int q) {
  const auto& [plus, cross] = end;
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
    case contrast:
      return cross.silent[j] * (plus.live * plus.caught[i] + plus.dark * cross.caught[i]);
    default:
      return plus.meets(demand_of_plus(outcome), i) * cross.meets(demand_of_cross(outcome), j);
  }
}

// The end's elements for one outcome and all sectors, normalised.
template <class T>
Sectors<T> end_elements(const EndTables<T>& end, const Rotation& rotation, int outcome, int cutoff, int deltas) {
  Sectors<T> elements(cutoff, deltas);
  Buffer<T> weight(static_cast<std::size_t>(cutoff) + 1);
  for (int n = 0; n <= cutoff; ++n) {
    for (int p = 0; p <= n; ++p) {
      weight[static_cast<std::size_t>(p)] = outcome_weight(end, outcome, p, n - p);
    }
    for (int delta = 0; delta <= deltas && delta <= n; ++delta) {
      for (int a = 0; a <= n - delta; ++a) {
        const auto* upper = rotation.row(Table<T>{}, n, a + delta);
        const auto* lower = rotation.row(Table<T>{}, n, a);
        const int b = n - delta - a;
        if (rotation.balanced() && a > b) {  // exchanging H and V only reverses cross
          elements.row(delta, a)[b] = elements.row(delta, b)[a];
          continue;
        }
        elements.row(delta, a)[b] = interleaved_sum<T>(
            n + 1, [&](int p) { return weight[static_cast<std::size_t>(p)] * T(upper[p] * lower[p]); });
      }
    }
  }
  return elements;
}

// Sectors above 0 by the geometric mean of the two diagonal elements, which bounds them (Cauchy and Schwarz).
template <class T>
void make_majorant(Sectors<T>& elements) {
  for (int delta = 1; delta <= elements.deltas(); ++delta) {
    for (int a = 0; a <= elements.cutoff() - delta; ++a) {
      for (int b = 0; b <= elements.cutoff() - delta - a; ++b) {
        elements.row(delta, a)[b] = geometric_mean(elements.row(0, a + delta)[b], elements.row(0, a)[b + delta]);
      }
    }
  }
}

// Ends at 0 or 90 degrees see photon numbers as they are: only sector 0, no sum.
template <class T>
Sectors<T> aligned_end_elements(const EndTables<T>& end, const Rotation& rotation, int outcome, int cutoff) {
  const bool exchanged = rough(rotation.row(Table<T>{}, 1, 1)[1]) == 0;
  Sectors<T> elements(cutoff, 0);
  for (int a = 0; a <= cutoff; ++a) {
    for (int b = 0; b <= cutoff - a; ++b) {
      elements.row(0, a)[b] = outcome_weight(end, outcome, exchanged ? b : a, exchanged ? a : b);
    }
  }
  return elements;
}

}  // namespace heraldgauge::fast
