#pragma once
// What the cut-offs leave out, bounded along with the vectors (the bounds of each place: tail.hpp).
//
// Of what is left out after some source, `beyond` has more pairs in this source than its cut-off. The rest, `within`,
// has more in an earlier one: a place with a source beyond its cut-off is replaced by a bound that knows no
// interference, so that only Delta = 0 is left behind it, and from there on the vector passes each station as the kept
// one does. What one place adds to `within` has the same shape for every left view, so few vectors carry it for all of
// them: `within` of a view is a sum of shapes, each times the view's share.

#include "fast/error_budget.hpp"
#include "fast/sector_product.hpp"
#include "fast/station_operator.hpp"
#include "fast/tail.hpp"

namespace heraldgauge::fast {

// Sums of a vector over all photon numbers with a + b = n, sector 0, added to `sums`.
template <class T>
void add_by_pairs(const Sectors<T>& sectors, Buffer<Rough<T>>& sums) {
  const int cutoff = sectors.cutoff();
  for (int a = 0; a <= cutoff; ++a) {
    const T* row = sectors.row(0, a);
    for (int b = 0; b <= cutoff - a; ++b) sums[static_cast<std::size_t>(a + b)] += rough(row[b]);
  }
}

template <class T>
class DroppedPairs {
 public:
  using R = Rough<T>;

  DroppedPairs(const Plan& plan, const LinkModes<T>& modes) : plan_(plan), modes_(modes) {}

  // weight: of the first source, by its pairs, one more than its cut-off.
  void start(const Buffer<T>& weight) {
    const int first_beyond = plan_.cutoffs[0] + 1;
    const R beyond = dropped_weight(0, weight);
    for (const EndView& view : plan_.left) {
      const R end = end_bound(end_dark(modes_.left), end_registering(modes_.left), view.outcome, first_beyond);
      dropped_.push_back({{}, beyond * end});
    }
  }

  // The bounds of station k, the same for all views.
  void prepare(std::size_t k) {
    const int in = plan_.cutoffs[k];
    const int out = plan_.cutoffs[k + 1];
    const StationMode<T>& mode = modes_.stations[k];
    const StationPlan& plan = plan_.stations[k];
    const double patterns = pattern_count(plan.terms);
    const auto w = [&](int n, int to) {
      return R(bound_slack) *
             (plan.free ? free_station_bound(mode.dark, mode.registering_r, mode.registering_l, n, to, clicks_of(plan))
                        : station_bound(mode.dark, mode.registering_r, mode.registering_l, n, to, patterns));
    };
    into_beyond_.clear();
    from_beyond_.clear();
    for (int n = 0; n <= in + 1; ++n) into_beyond_.push_back(w(n, out + 1));
    for (int to = 0; to <= out; ++to) from_beyond_.push_back(w(in + 1, to));
  }

  // kept[view][n]: what the vector holds for n pairs. weight: of the source after station k.
  void pass(std::size_t k, const Buffer<T>& weight, const Buffer<Buffer<R>>& kept, const StationOperator<T>& station) {
    const Buffer<R> beyond = next_beyond(dropped_weight(k + 1, weight), kept);
    for (Shape& shape : shapes_) pass_shape(k, weight, station, shape.vector);
    if (!own_shapes_ && shapes_.size() == dropped_.size()) make_shapes_of_views();
    add_shape(plan_.cutoffs[k + 1], weight);
    for (Shape& shape : shapes_) {
      shape.by_pairs.assign(static_cast<std::size_t>(plan_.cutoffs[k + 1]) + 1, R(0.0));
      add_by_pairs(shape.vector, shape.by_pairs);
    }
    for (std::size_t view = 0; view < dropped_.size(); ++view) dropped_[view].beyond = beyond[view];
  }

  // Bound on what is missing in a sum with a right end.
  R total(std::size_t view, const R& dark, const R& registering, int outcome) const {
    const int cutoff = plan_.cutoffs.back();
    R sum = dropped_[view].beyond * end_bound(dark, registering, outcome, cutoff + 1);
    for (int n = 0; n <= cutoff; ++n) {
      sum += within(view, static_cast<std::size_t>(n)) * end_bound(dark, registering, outcome, n);
    }
    return R(bound_slack) * sum;
  }

  static R end_dark(const EndMode<T>& end) { return larger(rough(end.dark[0]), rough(end.dark[1])); }
  static R end_registering(const EndMode<T>& end) {
    return larger(rough(end.registering[0]), rough(end.registering[1]));
  }

 private:
  struct Shape {
    Sectors<T> vector;
    Buffer<R> by_pairs;
  };
  struct Dropped {
    Buffer<R> shares;  // one a shape
    R beyond;
  };

  // `within` of a view for n pairs.
  R within(std::size_t view, std::size_t n) const {
    R sum(0.0);
    for (std::size_t i = 0; i < shapes_.size(); ++i) sum += dropped_[view].shares[i] * shapes_[i].by_pairs[n];
    return sum;
  }

  // Upper bound on the summed weights pi(n) of n > cutoff, each with its growth at the neighbouring places.
  R dropped_weight(std::size_t k, const Buffer<T>& weight) const {
    if (!plan_.squeezed[k]) return R(0.0);
    const int cutoff = plan_.cutoffs[k];
    const R ratio = dropped_ratio(rough(modes_.parameter[k]), cutoff);
    return R(bound_slack * (cutoff + 2)) * rough(weight[static_cast<std::size_t>(cutoff) + 1]) / (R(1.0) - ratio);
  }

  // beyond of every view after the station.
  Buffer<R> next_beyond(const R& beyond_weight, const Buffer<Buffer<R>>& kept) const {
    Buffer<R> beyond;
    for (std::size_t view = 0; view < dropped_.size(); ++view) {
      R sum = into_beyond_.back() * dropped_[view].beyond;
      for (std::size_t n = 0; n < kept[view].size(); ++n) sum += into_beyond_[n] * (kept[view][n] + within(view, n));
      beyond.push_back(beyond_weight * sum);
    }
    return beyond;
  }

  void pass_shape(std::size_t k, const Buffer<T>& weight, const StationOperator<T>& station, Sectors<T>& vector) {
    after_.reset(plan_.cutoffs[k + 1], 0);
    for (const Term& term : plan_.stations[k].terms) {
      product_.add(station.factors(term), weight.data(), plan_.polarisations_alike, vector, after_, 0);
    }
    std::swap(vector, after_);
  }

  // As many shapes as views: from now on every view has one of its own.
  void make_shapes_of_views() {
    Buffer<Shape> own(dropped_.size());
    for (std::size_t view = 0; view < dropped_.size(); ++view) {
      own[view].vector.reset(shapes_[0].vector.cutoff(), 0);
      for (std::size_t i = 0; i < shapes_.size(); ++i) {
        add_scaled(T(R(bound_slack) * dropped_[view].shares[i]), shapes_[i].vector, own[view].vector);
      }
    }
    for (std::size_t view = 0; view < dropped_.size(); ++view) {
      dropped_[view].shares.assign(dropped_.size(), R(0.0));
      dropped_[view].shares[view] = R(1.0);
    }
    shapes_ = std::move(own);
    own_shapes_ = true;
  }

  // What a source beyond its cut-off before the station leads to: weight w, the same for all a + b = n.
  void add_shape(int cutoff, const Buffer<T>& weight) {
    Sectors<T> added(cutoff, 0);
    for (int a = 0; a <= cutoff; ++a) {
      for (int b = 0; b <= cutoff - a; ++b) {
        const auto n = static_cast<std::size_t>(a + b);
        added.row(0, a)[b] = weight[n] * T(from_beyond_[n]);
      }
    }
    for (std::size_t view = 0; view < dropped_.size(); ++view) {
      if (own_shapes_) add_scaled(T(dropped_[view].beyond), added, shapes_[view].vector);
      if (!own_shapes_) dropped_[view].shares.push_back(dropped_[view].beyond);
    }
    if (!own_shapes_) shapes_.push_back({std::move(added), {}});
  }

  static void add_scaled(const T& factor, const Sectors<T>& from, Sectors<T>& to) {
    for (std::size_t i = 0; i < to.data().size(); ++i) to.data()[i] += factor * from.data()[i];
  }

  const Plan& plan_;
  const LinkModes<T>& modes_;
  Buffer<Dropped> dropped_;  // one a left view
  Buffer<Shape> shapes_;
  bool own_shapes_ = false;  // one a view
  Sectors<T> after_;
  Buffer<R> into_beyond_;  // from n pairs within the cut-off, or one beyond (the last)
  Buffer<R> from_beyond_;  // to n pairs
  SectorProduct<T> product_;
};

}  // namespace heraldgauge::fast
