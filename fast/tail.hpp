#pragma once
// Bounds that stand in for a place with a source beyond its cut-off (the model's third bound, summed over the number of
// pairs): w, an upper bound of P(outcome | pair numbers) that knows no interference.

#include <vector>

#include "fast/plan.hpp"

namespace heraldgauge::fast {

// min(1, D + e): r detectors are required to click, each by a photon or a dark event.
template <class R>
R two_clicks_bound(const R& dark, const R& first, const R& second) {
  const R one(1.0);
  return dark * dark + R(2.0) * dark * smaller(one, first) + smaller(one, second);
}

// w of a station for n_r and n_l photons before its arms; `patterns` is the number of click patterns accepted.
template <class R>
R station_bound(const R& dark, const R& tau_r, const R& tau_l, double n_r, double n_l, double patterns) {
  const R first = R(n_r) * tau_r + R(n_l) * tau_l;
  const R second =
      R(n_r * (n_r - 1) / 2) * tau_r * tau_r + R(n_r * n_l) * tau_r * tau_l + R(n_l * (n_l - 1) / 2) * tau_l * tau_l;
  return smaller(R(1.0), R(patterns) * two_clicks_bound(dark, first, second));
}

// w of an end for an outcome and n photons.
template <class R>
R end_bound(const R& dark, const R& registering, int outcome, double n) {
  const R one(1.0);
  const R first = smaller(one, R(n) * registering);
  switch (outcome) {
    case silent_both:
      return one;
    case both_click:
      return smaller(one, two_clicks_bound(dark, first, R(n * (n - 1) / 2) * registering * registering));
    case bit_plus:
    case bit_cross:
      return smaller(one, R(2.0) * dark + first);
    default:
      break;
  }
  if (outcome < first_free) return smaller(one, dark + first);
  const int clicks = (demand_of_plus(outcome) == Demand::clicks) + (demand_of_cross(outcome) == Demand::clicks);
  if (clicks == 0) return one;
  return clicks == 1 ? smaller(one, dark + first) : end_bound(dark, registering, both_click, n);
}

// The same of a station for a free pattern.
template <class R>
R free_station_bound(const R& dark, const R& tau_r, const R& tau_l, double n_r, double n_l, int clicks) {
  if (clicks == 0) return R(1.0);
  if (clicks == 1) return smaller(R(1.0), dark + R(n_r) * tau_r + R(n_l) * tau_l);
  return station_bound(dark, tau_r, tau_l, n_r, n_l, 1);
}

// Clicks that a free pattern demands of a station.
inline int clicks_of(const StationPlan& station) {
  int clicks = 0;
  for (const auto& polarisation : station.demands) {
    for (const Demand demand : polarisation) clicks += demand == Demand::clicks ? 1 : 0;
  }
  return clicks;
}

// The number of click patterns that a list of terms accepts.
inline double pattern_count(const std::vector<Term>& terms) {
  double count = 0;
  for (const Term& term : terms) count += (term.h == 2 ? 2 : 1) * (term.v == 2 ? 2 : 1);
  return count;
}

// Ratio of successive dropped weights of a source from cutoff + 1 on, both neighbours included (each requires at most
// two clicks); the sum of them is at most the first over 1 - ratio.
template <class R>
R dropped_ratio(const R& lam, int cutoff) {
  const double first = cutoff + 1;
  const double growth = (first + 1) / (first - 1);
  return lam * R((first + 2) / (first + 1) * growth * growth);
}

}  // namespace heraldgauge::fast
