#pragma once
// The chain by pair numbers: vectors over (Delta, a, b) go from the left end through the stations, and are contracted
// with the right end. H has the photon numbers a and a+Delta on its two sides, V has b and b+Delta; a + b + Delta pairs
// in all.

#include <array>
#include <vector>

#include "fast/contraction.hpp"
#include "fast/dropped_pairs.hpp"
#include "fast/error_budget.hpp"
#include "fast/plan.hpp"
#include "fast/sector_product.hpp"

namespace heraldgauge::fast {

template <class T>
struct KernelResult {
  T herald = T(0.0);
  Rough<T> herald_tail = Rough<T>(0.0);
  Buffer<PairedSum<T>> sums;  // one a pairing
  Sectors<T> final_vector;    // at the right end, of Plan::final_view (even and odd summed)
  Rough<T> final_tail = Rough<T>(0.0);
  std::array<long, Precision<T>::width> exponent{};  // all numbers above times 2^exponent
  Rough<T> count = Rough<T>(0.0);                    // relative error of a positive sum, in units
};

template <class T>
class Kernel {
 public:
  Kernel(const Plan& plan, const LinkModes<T>& modes) : plan_(plan), modes_(modes), dropped_(plan, modes) {}

  KernelResult<T> run() {
    start();
    for (std::size_t k = 0; k < plan_.stations.size(); ++k) pass_station(k);
    return finish();
  }

 private:
  using R = Rough<T>;
  using State = Buffer<Sectors<T>>;  // [even, odd] or one

  // By pairs, one more than the cut-off.
  void weigh_source(std::size_t k, const T& scale) {
    const auto size = static_cast<std::size_t>(plan_.cutoffs[k]) + 2;
    weight_.assign(1, modes_.vacuum[k] * scale);
    if (!plan_.squeezed[k]) weight_.push_back(T(0.5) * modes_.parameter[k] * scale);
    while (weight_.size() < size) {
      weight_.push_back(plan_.squeezed[k] ? weight_.back() * modes_.parameter[k] : T(0.0));
    }
  }

  void start() {
    weigh_source(0, T(1.0));
    const int cutoff = plan_.cutoffs[0];
    const EndTables<T> tables(modes_.left, cutoff);
    for (const EndView& view : plan_.left) {
      const int deltas = view.sectors ? plan_.deltas() : 0;
      const auto table = rotation(view.angle, cutoff);
      Sectors<T> vector = deltas == 0 && table->aligned() ? aligned_end_elements(tables, *table, view.outcome, cutoff)
                                                          : end_elements(tables, *table, view.outcome, cutoff, deltas);
      if (plan_.majorant) make_majorant(vector);
      lower(vector);
      State state;
      state.push_back(std::move(vector));
      if (plan_.parity) state.emplace_back(cutoff, deltas);
      states_.push_back(std::move(state));
    }
    count_ = R(end_count(cutoff) + source_count(cutoff));
    dropped_.start(weight_);
    kept_.resize(states_.size());
    rescale();
  }

  // Source weights, and out of the normalised basis.
  void lower(Sectors<T>& vector) const {
    for (int delta = 0; delta <= vector.deltas(); ++delta) {
      const auto* raise = raising_factors(Table<T>{}, delta);
      for (int a = 0; a <= vector.cutoff() - delta; ++a) {
        T* row = vector.row(delta, a);
        const T* weight = weight_.data() + a + delta;
        for (int b = 0; b <= vector.cutoff() - delta - a; ++b) {
          row[b] = row[b] * weight[b];
          if (delta > 0) row[b] = row[b] / T(raise[a] * raise[b]);
        }
      }
    }
  }

  void pass_station(std::size_t k) {
    if (!plan_.stations[k].as_before) {
      station_.prepare(plan_.stations[k], modes_.stations[k], plan_.majorant, plan_.cutoffs[k], plan_.cutoffs[k + 1]);
      dropped_.prepare(k);
    }
    weigh_source(k + 1, next_scale_);
    for (std::size_t lane = 0; lane < exponent_.size(); ++lane) exponent_[lane] += next_exponent_[lane];
    dropped_.pass(k, weight_, kept_, station_);
    for (std::size_t view = 0; view < states_.size(); ++view) {
      pass(plan_.stations[k].terms, plan_.cutoffs[k + 1], plan_.left[view].symmetric, states_[view]);
    }
    count_ = count_ + station_count(plan_.cutoffs[k], plan_.cutoffs[k + 1], station_.loss());
    rescale();
  }

  void pass(const std::vector<Term>& terms, int cutoff, bool symmetric, State& state) {
    after_.resize(state.size());
    for (Sectors<T>& sectors : after_) sectors.reset(cutoff, state[0].deltas());
    for (const Term& term : terms) {
      for (std::size_t from = 0; from < state.size(); ++from) {
        Sectors<T>& to = after_[state.size() == 2 && term.minus ? 1 - from : from];
        for (int delta = 0; delta <= state[from].deltas(); ++delta) {
          product_.add(station_.factors(term), weight_.data(), symmetric, state[from], to, delta);
        }
      }
    }
    state.swap(after_);
  }

  void rescale() {
    for (std::size_t view = 0; view < states_.size(); ++view) {
      kept_[view].assign(static_cast<std::size_t>(states_[view][0].cutoff()) + 1, R(0.0));
      for (const Sectors<T>& sectors : states_[view]) add_by_pairs(sectors, kept_[view]);
    }
    R total(0.0);
    for (const HeraldPart& part : plan_.herald) {
      for (const R& sum : kept_[static_cast<std::size_t>(part.view)]) total += R(part.times) * sum;
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
    for (const HeraldPart& part : plan_.herald) {
      const auto view = static_cast<std::size_t>(part.view);
      for (const Sectors<T>& sectors : states_[view]) result.herald += T(part.times) * sum_of_all(sectors);
      result.herald_tail += R(part.times) * dropped_.total(view, R(0.0), R(1.0), silent_both);
    }
    pair_with_right_end(result.sums);
    if (plan_.final_view >= 0) take_final_vector(result);
    result.exponent = exponent_;
    result.count = count_ + R(end_count(cutoff) + contraction_count(cutoff));
    return result;
  }

  void pair_with_right_end(Buffer<PairedSum<T>>& sums) {
    const int cutoff = plan_.cutoffs.back();
    const EndTables<T> tables(modes_.right, cutoff);
    Buffer<Sectors<T>> right;
    right.reserve(plan_.right.size());
    for (const EndView& view : plan_.right) {
      const auto table = rotation(view.angle, cutoff);
      right.push_back(
          right_elements(tables, *table, view.outcome, cutoff, view.sectors ? plan_.deltas() : 0, plan_.majorant));
    }
    sums.reserve(plan_.pairings.size());
    for (const Pairing& pairing : plan_.pairings) sums.push_back(paired(pairing, right));
    add_tails(sums);
  }

  // The bound knows the outcomes only, which successive pairings often share.
  void add_tails(Buffer<PairedSum<T>>& sums) const {
    const auto outcome = [&](const Pairing& p) { return plan_.right[static_cast<std::size_t>(p.right)].outcome; };
    for (std::size_t i = 0; i < sums.size(); ++i) {
      const Pairing& pairing = plan_.pairings[i];
      const bool as_before =
          i > 0 && pairing.left == plan_.pairings[i - 1].left && outcome(pairing) == outcome(plan_.pairings[i - 1]);
      sums[i].tail =
          as_before ? sums[i - 1].tail : tail_at_right_end(static_cast<std::size_t>(pairing.left), outcome(pairing));
    }
  }

  PairedSum<T> paired(const Pairing& pairing, const Buffer<Sectors<T>>& right) {
    const State& state = states_[static_cast<std::size_t>(pairing.left)];
    PairedSum<T> sum;
    for (std::size_t s = 0; s < state.size(); ++s) {
      const bool odd = plan_.parity ? s == 1 : plan_.odd;
      const int index = odd ? pairing.right_odd : pairing.right;
      const bool alternating = (odd && pairing.right_odd != pairing.right) != pairing.mirrored;
      const Sectors<T>& vector = pairing.transposed ? exchanged(pairing.left, s) : state[s];
      contraction_.add(vector, right[static_cast<std::size_t>(index)], alternating, sum);
    }
    return sum;
  }

  // A left view with H and V exchanged, made once.
  const Sectors<T>& exchanged(int view, std::size_t s) {
    const State& state = states_[static_cast<std::size_t>(view)];
    exchanged_.resize(states_.size());
    State& made = exchanged_[static_cast<std::size_t>(view)];
    if (made.empty()) {
      for (const Sectors<T>& sectors : state) made.push_back(transposed(sectors));
    }
    return made[s];
  }

  R tail_at_right_end(std::size_t left_view, int outcome) const {
    return dropped_.total(left_view, dropped_.end_dark(modes_.right), dropped_.end_registering(modes_.right), outcome);
  }

  void take_final_vector(KernelResult<T>& result) {
    const auto view = static_cast<std::size_t>(plan_.final_view);
    result.final_tail = tail_at_right_end(view, only_plus);
    State& state = states_[view];
    for (std::size_t s = 1; s < state.size(); ++s) {
      for (std::size_t i = 0; i < state[0].data().size(); ++i) state[0].data()[i] += state[s].data()[i];
    }
    result.final_vector = std::move(state[0]);
  }

  const Plan& plan_;
  const LinkModes<T>& modes_;
  DroppedPairs<T> dropped_;
  StationOperator<T> station_;
  SectorProduct<T> product_;
  Contraction<T> contraction_;
  Buffer<State> exchanged_;  // of some left views, at the right end
  Buffer<State> states_;     // one a left view
  State after_;
  Buffer<Buffer<R>> kept_;  // [left view][pairs]
  Buffer<T> weight_;
  R count_ = R(0.0);
  T next_scale_ = T(1.0);
  std::array<int, Precision<T>::width> next_exponent_{};
  std::array<long, Precision<T>::width> exponent_{};
};

}  // namespace heraldgauge::fast
