#pragma once
// The chain by pair numbers: vectors over (Delta, a, b) go from the left end through the stations, and are contracted
// with the right end. H has the photon numbers a and a+Delta on its two sides, V has b and b+Delta; a + b + Delta pairs
// in all.

#include <array>
#include <vector>

#include "fast/error_budget.hpp"
#include "fast/plan.hpp"
#include "fast/tail.hpp"

namespace heraldgauge::fast {

// Numbers of one pairing: the value is right to within count * unit * magnitude, and lies at most `tail` below the
// exact one.
template <class T>
struct PairedSum {
  T value;
  Rough<T> magnitude;
  Rough<T> tail;
};

template <class T>
struct KernelResult {
  T herald;
  Rough<T> herald_tail;
  std::vector<PairedSum<T>> sums;     // one a pairing
  std::vector<Sectors<T>> finals;     // the vectors at the right end, one a left view (even and odd summed)
  std::vector<Rough<T>> final_tails;  // of each left view, for a right end with one required click
  std::array<long, Precision<T>::width> exponent{};  // all numbers above times 2^exponent
  Rough<T> count;                                    // relative error of a positive sum, in units
};

template <class T>
class Kernel {
 public:
  Kernel(const Plan& plan, const LinkModes<T>& modes) : plan_(plan), modes_(modes) {}

  KernelResult<T> run() {
    start();
    for (std::size_t k = 0; k < plan_.stations.size(); ++k) pass_station(k);
    return finish();
  }

 private:
  using R = Rough<T>;
  using State = std::vector<Sectors<T>>;  // [even, odd] or one

  std::vector<T> source_weights(std::size_t k, const T& scale) const {
    const int cutoff = plan_.cutoffs[k];
    std::vector<T> weight{modes_.vacuum[k] * scale};
    if (!plan_.squeezed[k]) weight.push_back(T(0.5) * modes_.parameter[k] * scale);
    while (static_cast<int>(weight.size()) <= cutoff + 1) {
      weight.push_back(plan_.squeezed[k] ? weight.back() * modes_.parameter[k] : T(0.0));
    }
    return weight;
  }

  void start() {
    const std::vector<T> weight = source_weights(0, T(1.0));
    const int cutoff = plan_.cutoffs[0];
    for (const EndView& view : plan_.left) {
      const int deltas = view.sectors ? plan_.deltas() : 0;
      const auto table = rotation(view.angle, cutoff);
      Sectors<T> vector = !view.sectors && table->aligned()
                              ? aligned_end_elements(modes_.left, *table, view.outcome, cutoff)
                              : end_elements(modes_.left, *table, view.outcome, cutoff, deltas);
      lower(vector, weight);
      State state{std::move(vector)};
      if (plan_.parity) state.emplace_back(cutoff, deltas);
      states_.push_back(std::move(state));
    }
    count_ = R(end_count(cutoff) + source_count(cutoff));
    start_dropped(weight);
    rescale();
  }

  // Source weights, and out of the normalised basis.
  void lower(Sectors<T>& vector, const std::vector<T>& weight) const {
    for (int delta = 0; delta <= vector.deltas(); ++delta) {
      const auto* raise = raising_factors(Table<T>{}, delta);
      for (int a = 0; a <= vector.cutoff() - delta; ++a) {
        T* row = vector.row(delta, a);
        for (int b = 0; b <= vector.cutoff() - delta - a; ++b) {
          row[b] = row[b] * weight[static_cast<std::size_t>(a + b + delta)];
          if (delta > 0) row[b] = row[b] / T(raise[a] * raise[b]);
        }
      }
    }
  }

  void start_dropped(const std::vector<T>& weight) {
    const int cutoff = plan_.cutoffs[0];
    const R beyond = dropped_weight(0, weight);
    for (const EndView& view : plan_.left) {
      Dropped<R> dropped;
      dropped.within.assign(static_cast<std::size_t>(cutoff) + 1, R(0.0));
      dropped.beyond =
          beyond * end_bound(end_dark(modes_.left), end_registering(modes_.left), view.outcome, cutoff + 1);
      dropped_.push_back(std::move(dropped));
    }
  }

  // Upper bound on the summed weights pi(n) of n > cutoff, each with its growth at the neighbouring places.
  R dropped_weight(std::size_t k, const std::vector<T>& weight) const {
    if (!plan_.squeezed[k]) return R(0.0);
    const int cutoff = plan_.cutoffs[k];
    const R ratio = dropped_ratio(rough(modes_.parameter[k]), cutoff);
    return R(bound_slack * (cutoff + 2)) * rough(weight[static_cast<std::size_t>(cutoff) + 1]) / (R(1.0) - ratio);
  }

  static R end_dark(const EndMode<T>& end) { return larger(rough(end.dark[0]), rough(end.dark[1])); }
  static R end_registering(const EndMode<T>& end) {
    return larger(rough(end.registering[0]), rough(end.registering[1]));
  }

  void prepare_station(std::size_t k) {
    const StationPlan& station = plan_.stations[k];
    if (station.as_before) return;
    const int in = plan_.cutoffs[k];
    const int out = plan_.cutoffs[k + 1];
    loss_ = R(1.0);
    for (std::size_t p = 0; p < 2; ++p) {
      if (p == 1 && station.polarisations_alike) {
        elements_[1] = elements_[0];
        break;
      }
      elements_[p][0] = click_elements(modes_.stations[k].click[p][0], station.overlap[p][0], in, out, loss_);
      elements_[p][1] = station.alike[p]
                            ? elements_[p][0]
                            : click_elements(modes_.stations[k].click[p][1], station.overlap[p][1], in, out, loss_);
      elements_[p][2] = elements_[p][0];
      for (std::size_t i = 0; i < elements_[p][2].data().size(); ++i)
        elements_[p][2].data()[i] += elements_[p][1].data()[i];
    }
    bound_rows(station.terms, in, out);
  }

  // e(n,n'): the largest over h of sum_h' E_H(h,h') E_V(n-h,n'-h').
  void bound_rows(const std::vector<Term>& terms, int in, int out) {
    row_bound_.assign(static_cast<std::size_t>((in + 1) * (out + 1)), R(0.0));
    for (int n = 0; n <= in; ++n) {
      for (int to = 0; to <= out; ++to) {
        R most(0.0);
        for (int h = 0; h <= n; ++h) {
          R sum(0.0);
          for (const Term& term : terms) {
            const T* first = elements_[0][static_cast<std::size_t>(term.h)].row(0, h);
            const T* second = elements_[1][static_cast<std::size_t>(term.v)].row(0, n - h);
            for (int j = 0; j <= to; ++j) sum += rough(first[j]) * rough(second[to - j]);
          }
          most = larger(most, sum);
        }
        row_bound_[static_cast<std::size_t>(n * (out + 1) + to)] = R(bound_slack) * most;
      }
    }
  }

  void pass_station(std::size_t k) {
    prepare_station(k);
    const std::vector<T> weight = source_weights(k + 1, next_scale_);
    for (int lane = 0; lane < Precision<T>::width; ++lane) {
      exponent_[static_cast<std::size_t>(lane)] += next_exponent_[static_cast<std::size_t>(lane)];
    }
    for (std::size_t view = 0; view < states_.size(); ++view) {
      pass_dropped(k, weight, view);
      states_[view] = passed(k, weight, states_[view]);
    }
    count_ = count_ + station_count(plan_.cutoffs[k], plan_.cutoffs[k + 1], loss_);
    rescale();
  }

  State passed(std::size_t k, const std::vector<T>& weight, const State& before) const {
    const int out = plan_.cutoffs[k + 1];
    State after(before.size(), Sectors<T>(out, before[0].deltas()));
    for (const Term& term : plan_.stations[k].terms) {
      for (std::size_t from = 0; from < before.size(); ++from) {
        const std::size_t to = before.size() == 2 && term.minus ? 1 - from : from;
        for (int delta = 0; delta <= before[from].deltas(); ++delta) add_product(term, before[from], after[to], delta);
      }
    }
    for (Sectors<T>& sectors : after) {
      for (int delta = 0; delta <= sectors.deltas(); ++delta) weigh(sectors, delta, weight);
    }
    return after;
  }

  void weigh(Sectors<T>& sectors, int delta, const std::vector<T>& weight) const {
    for (int a = 0; a <= sectors.cutoff() - delta; ++a) {
      T* row = sectors.row(delta, a);
      for (int b = 0; b <= sectors.cutoff() - delta - a; ++b)
        row[b] = row[b] * weight[static_cast<std::size_t>(a + b + delta)];
    }
  }

  // after += E_H^T before E_V in one sector; sums run from many photons to few, from small terms to large.
  void add_product(const Term& term, const Sectors<T>& before, Sectors<T>& after, int delta) const {
    const Elements<T>& h = elements_[0][static_cast<std::size_t>(term.h)];
    const Elements<T>& v = elements_[1][static_cast<std::size_t>(term.v)];
    const int in = before.cutoff() - delta;
    const int out = after.cutoff() - delta;
    std::vector<T> half(static_cast<std::size_t>(in) + 1);
    for (int a_out = 0; a_out <= out; ++a_out) {
      for (T& x : half) x = T(0.0);
      for (int a = in; a >= 0; --a) {
        const T factor = h.row(delta, a)[a_out];
        const T* row = before.row(delta, a);
        for (int b = 0; b <= in - a; ++b) half[static_cast<std::size_t>(b)] += factor * row[b];
      }
      T* to = after.row(delta, a_out);
      for (int b = in; b >= 0; --b) {
        const T factor = half[static_cast<std::size_t>(b)];
        const T* row = v.row(delta, b);
        for (int b_out = 0; b_out <= out - a_out; ++b_out) to[b_out] += factor * row[b_out];
      }
    }
  }

  // Sums of a vector over all photon numbers with a + b = n, sector 0.
  std::vector<R> by_pairs(const State& state) const {
    const int cutoff = state[0].cutoff();
    std::vector<R> sums(static_cast<std::size_t>(cutoff) + 1, R(0.0));
    for (const Sectors<T>& sectors : state) {
      for (int a = 0; a <= cutoff; ++a) {
        for (int b = 0; b <= cutoff - a; ++b) sums[static_cast<std::size_t>(a + b)] += rough(sectors.row(0, a)[b]);
      }
    }
    return sums;
  }

  void pass_dropped(std::size_t k, const std::vector<T>& weight, std::size_t view) {
    const int in = plan_.cutoffs[k];
    const int out = plan_.cutoffs[k + 1];
    const StationMode<T>& mode = modes_.stations[k];
    const double patterns = pattern_count(plan_.stations[k].terms);
    const auto w = [&](int n, int to) {
      return station_bound(mode.dark, mode.registering_r, mode.registering_l, n, to, patterns);
    };
    const Dropped<R> before = dropped_[view];
    const std::vector<R> kept = by_pairs(states_[view]);
    Dropped<R>& after = dropped_[view];
    after.within.assign(static_cast<std::size_t>(out) + 1, R(0.0));
    R beyond = w(in + 1, out + 1) * before.beyond;
    for (int n = 0; n <= in; ++n) {
      const R within = before.within[static_cast<std::size_t>(n)];
      beyond += w(n, out + 1) * (kept[static_cast<std::size_t>(n)] + within);
      for (int to = 0; to <= out; ++to) {
        after.within[static_cast<std::size_t>(to)] += row_bound_[static_cast<std::size_t>(n * (out + 1) + to)] * within;
      }
    }
    for (int to = 0; to <= out; ++to) {
      R& sum = after.within[static_cast<std::size_t>(to)];
      sum = R(bound_slack) * rough(weight[static_cast<std::size_t>(to)]) *
            (sum + R(to + 1.0) * w(in + 1, to) * before.beyond);
    }
    after.beyond = dropped_weight(k + 1, weight) * beyond;
  }

  // The first four left views are the outcomes at 0 degrees, which together are the herald.
  void rescale() {
    R total(0.0);
    for (std::size_t view = 0; view < 4; ++view) {
      for (const R& sum : by_pairs(states_[view])) total += sum;
    }
    R scale(1.0);
    for (int lane = 0; lane < Precision<T>::width; ++lane) {
      const int exponent = binary_exponent(lane_of(total, lane));
      next_exponent_[static_cast<std::size_t>(lane)] = exponent;
      set_lane(scale, lane, std::ldexp(1.0, -exponent));
    }
    next_scale_ = T(scale);
  }

  KernelResult<T> finish() {
    KernelResult<T> result;
    const int cutoff = plan_.cutoffs.back();
    const double ones = 1.0;
    result.herald = T(0.0);
    result.herald_tail = R(0.0);
    for (std::size_t view = 0; view < 4; ++view) {
      for (const Sectors<T>& sectors : states_[view]) result.herald += contracted_with_one(sectors);
      result.herald_tail += dropped_total(view, R(0.0), R(ones), silent_both);
    }
    std::vector<Sectors<T>> right;
    for (const EndView& view : plan_.right) right.push_back(right_elements(view));
    for (const Pairing& pairing : plan_.pairings) result.sums.push_back(paired(pairing, right));
    for (std::size_t view = 0; view < states_.size(); ++view) {
      result.final_tails.push_back(
          dropped_total(view, end_dark(modes_.right), end_registering(modes_.right), only_plus));
      for (std::size_t s = 1; s < states_[view].size(); ++s) {
        for (std::size_t i = 0; i < states_[view][0].data().size(); ++i)
          states_[view][0].data()[i] += states_[view][s].data()[i];
      }
      result.finals.push_back(std::move(states_[view][0]));
    }
    result.exponent = exponent_;
    result.count = count_ + R(end_count(cutoff) + contraction_count(cutoff));
    return result;
  }

  T contracted_with_one(const Sectors<T>& sectors) const {
    T sum(0.0);
    for (int a = sectors.cutoff(); a >= 0; --a) {
      for (int b = sectors.cutoff() - a; b >= 0; --b) sum += sectors.row(0, a)[b];
    }
    return sum;
  }

  R dropped_total(std::size_t view, const R& dark, const R& registering, int outcome) const {
    const Dropped<R>& dropped = dropped_[view];
    const int cutoff = plan_.cutoffs.back();
    R sum = dropped.beyond * end_bound(dark, registering, outcome, cutoff + 1);
    for (int n = 0; n <= cutoff; ++n) {
      sum += dropped.within[static_cast<std::size_t>(n)] * end_bound(dark, registering, outcome, n);
    }
    return R(bound_slack) * sum;
  }

  Sectors<T> right_elements(const EndView& view) const {
    const int cutoff = plan_.cutoffs.back();
    const auto table = rotation(view.angle, cutoff);
    if (!view.sectors && table->aligned()) return aligned_end_elements(modes_.right, *table, view.outcome, cutoff);
    Sectors<T> elements = end_elements(modes_.right, *table, view.outcome, cutoff, view.sectors ? plan_.deltas() : 0);
    raise(elements);
    return elements;
  }

  PairedSum<T> paired(const Pairing& pairing, const std::vector<Sectors<T>>& right) const {
    const State& state = states_[static_cast<std::size_t>(pairing.left)];
    PairedSum<T> sum{T(0.0), R(0.0), R(0.0)};
    for (std::size_t s = 0; s < state.size(); ++s) {
      const bool odd = plan_.parity ? s == 1 : plan_.odd;
      const int index = odd ? pairing.right_odd : pairing.right;
      const bool alternating = (odd && pairing.right_odd != pairing.right) != pairing.mirrored;
      add_pairing(state[s], right[static_cast<std::size_t>(index)], alternating, sum);
    }
    sum.tail =
        dropped_total(static_cast<std::size_t>(pairing.left), end_dark(modes_.right), end_registering(modes_.right),
                      plan_.right[static_cast<std::size_t>(pairing.right)].outcome);
    return sum;
  }

 public:
  // Back into the normalised basis.
  static void raise(Sectors<T>& elements) {
    for (int delta = 1; delta <= elements.deltas(); ++delta) {
      const auto* factor = raising_factors(Table<T>{}, delta);
      for (int a = 0; a <= elements.cutoff() - delta; ++a) {
        T* row = elements.row(delta, a);
        for (int b = 0; b <= elements.cutoff() - delta - a; ++b) row[b] = row[b] * T(factor[a] * factor[b]);
      }
    }
  }

  // Adds the contraction of a vector with a right end: the value, and the largest that all its terms can come to in
  // size. By Cauchy and Schwarz the terms of sector Delta are at most the geometric mean of those of sector 0 with h >=
  // Delta and with v >= Delta at the last source.
  static void add_pairing(const Sectors<T>& left, const Sectors<T>& right, bool alternating, PairedSum<T>& sum) {
    const int cutoff = left.cutoff();
    const int deltas = left.deltas() < right.deltas() ? left.deltas() : right.deltas();
    std::vector<R> by_h(static_cast<std::size_t>(cutoff) + 1, R(0.0));
    std::vector<R> by_v(static_cast<std::size_t>(cutoff) + 1, R(0.0));
    for (int delta = deltas; delta >= 0; --delta) {
      T sector(0.0);
      for (int a = cutoff - delta; a >= 0; --a) {
        const T* x = left.row(delta, a);
        const T* y = right.row(delta, a);
        T row(0.0);
        for (int b = cutoff - delta - a; b >= 0; --b) {
          const T term = x[b] * y[b];
          row += term;
          if (delta == 0) by_v[static_cast<std::size_t>(b)] += rough(term);
        }
        if (delta == 0) by_h[static_cast<std::size_t>(a)] = rough(row);
        sector += row;
      }
      if (delta > 0) sector = sector * T(alternating && delta % 2 == 1 ? -2.0 : 2.0);
      sum.value += sector;
    }
    R from_h(0.0);
    R from_v(0.0);
    for (int n = cutoff; n >= 0; --n) {
      from_h += by_h[static_cast<std::size_t>(n)];
      from_v += by_v[static_cast<std::size_t>(n)];
      if (n == 0) sum.magnitude += from_h;
      if (n > 0 && n <= deltas) sum.magnitude += from_h + from_v;
    }
  }

 private:
  const Plan& plan_;
  const LinkModes<T>& modes_;
  std::vector<State> states_;
  std::vector<Dropped<R>> dropped_;
  std::array<std::array<Elements<T>, 3>, 2> elements_;  // [polarisation][c, d, both]
  std::vector<R> row_bound_;
  R loss_ = R(1.0);
  R count_ = R(0.0);
  T next_scale_ = T(1.0);
  std::array<int, Precision<T>::width> next_exponent_{};
  std::array<long, Precision<T>::width> exponent_{};
};

}  // namespace heraldgauge::fast
