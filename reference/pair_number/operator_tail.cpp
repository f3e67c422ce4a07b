#include <algorithm>

#include "reference/pair_number/place_bound.hpp"
#include "reference/pair_number/source_weights.hpp"
#include "reference/pair_number/station_sequence.hpp"
#include "reference/pair_number/tail_bound.hpp"
#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

// The weights of one source: of a state within the cut-off, and of each pair number up to the last, which stands for
// all beyond it.
struct SourceShells {
  long cutoff;
  std::vector<Interval> state_weight;  // n = 0..cutoff
  std::vector<Interval> probability;   // n = 0..M
  long last() const { return static_cast<long>(probability.size()) - 1; }
};

// Configurations up to the present source: X with no source beyond its cut-off, Y with an earlier one beyond and the
// present one within, Z(n) with the present one beyond.
struct Configurations {
  Matrix x, y;
  std::vector<Interval> z;  // n = cutoff+1..M
};

std::vector<Interval> shell_sums(const Matrix& x, const Matrix& y) {
  std::vector<Interval> sums;
  for (long n = 0; n < x.rows(); ++n) {
    sums.emplace_back(x(0, 0).precision());
    for (long a = 0; a <= n; ++a) sums.back() += x(a, n - a) + y(a, n - a);
  }
  return sums;
}

Configurations at_first_source(const SourceShells& source, const Matrix& w, Precision bits) {
  Configurations state{
      Matrix(source.cutoff + 1, source.cutoff + 1, bits), Matrix(source.cutoff + 1, source.cutoff + 1, bits), {}};
  for (long a = 0; a <= source.cutoff; ++a) {
    for (long b = 0; a + b <= source.cutoff; ++b) state.x(a, b) = w(a + b, 0);
  }
  apply_weights(state.x, 0, source.state_weight);
  for (long n = source.cutoff + 1; n <= source.last(); ++n) {
    state.z.push_back(source.probability[static_cast<std::size_t>(n)] * w(n, 0));
  }
  return state;
}

// sum over z of w(n, column), n counted from the first row beyond the cut-off.
Interval through(const Matrix& w, const std::vector<Interval>& z, long first_row, long column) {
  Interval sum(w(0, 0).precision());
  for (std::size_t i = 0; i < z.size(); ++i) sum += w(first_row + static_cast<long>(i), column) * z[i];
  return sum;
}

Configurations through_station(const std::vector<Product>& products, const Matrix& w, const SourceShells& before,
                               const SourceShells& behind, const Configurations& state, Precision bits) {
  Configurations next{
      Matrix(behind.cutoff + 1, behind.cutoff + 1, bits), Matrix(behind.cutoff + 1, behind.cutoff + 1, bits), {}};
  for (const Product& product : products) {
    accumulate(next.x, product, state.x);
    accumulate(next.y, product, state.y);
  }
  for (long n = 0; n <= behind.cutoff; ++n) {
    const Interval returning = through(w, state.z, before.cutoff + 1, n);
    for (long a = 0; a <= n; ++a) next.y(a, n - a) += returning;
  }
  apply_weights(next.x, 0, behind.state_weight);
  apply_weights(next.y, 0, behind.state_weight);
  const std::vector<Interval> shells = shell_sums(state.x, state.y);
  for (long n = behind.cutoff + 1; n <= behind.last(); ++n) {
    const Interval sum = through(w, shells, 0, n) + through(w, state.z, before.cutoff + 1, n);
    next.z.push_back(sum * behind.probability[static_cast<std::size_t>(n)]);
  }
  return next;
}

Interval closed(const Configurations& state, const Matrix& w, long cutoff) {
  Interval sum = through(w, state.z, cutoff + 1, 0);
  for (long a = 0; a <= cutoff; ++a) {
    for (long b = 0; a + b <= cutoff; ++b) sum += state.y(a, b) * w(a + b, 0);
  }
  return sum;
}

long largest_order(const EndPlace& end, const std::vector<EndAsk>& asks) {
  long order = 0;
  for (const EndAsk& ask : asks) order = std::max(order, PlaceBound(end, ask, 53).order());
  return order;
}

}  // namespace

std::vector<std::vector<Interval>> tail_by_operators(const HeraldedChain& link, const std::vector<long>& cutoffs,
                                                     const std::vector<EndAsk>& left, const std::vector<EndAsk>& right,
                                                     Precision bits) {
  std::vector<std::vector<Interval>> bounds(left.size());
  if (keep_all_pairs(link.chain.sources, cutoffs)) {  // a sum of no terms
    bounds.assign(left.size(), std::vector<Interval>(right.size(), Interval(bits)));
    return bounds;
  }
  std::vector<long> orders{largest_order(link.left_end(), left)};
  const std::vector<PlaceBound> stations = station_bounds(link, bits);
  for (const PlaceBound& station : stations) orders.push_back(station.order());
  orders.push_back(largest_order(link.right_end(), right));
  const auto shells = [&](std::size_t k) {
    const model::Source& source = link.chain.sources[k];
    return SourceShells{cutoffs[k], state_weights(source, cutoffs[k], bits),
                        closed_pair_probabilities(source, cutoffs[k], orders[k], orders[k + 1], bits)};
  };
  SourceShells present = shells(0);
  std::vector<Configurations> states;
  for (const EndAsk& ask : left) {
    states.push_back(at_first_source(present, PlaceBound(link.left_end(), ask, bits).table(present.last(), 0), bits));
  }
  StationSequence operators(link, cutoffs, 0, bits);
  for (std::size_t k = 0; k < link.station_count(); ++k) {
    const SourceShells behind = shells(k + 1);
    const std::vector<Product> products = operators.at(k).products(0, Outcomes::corrected);
    const Matrix w = stations[k].table(present.last(), behind.last());
    for (Configurations& state : states) state = through_station(products, w, present, behind, state, bits);
    present = behind;
  }
  for (const EndAsk& ask : right) {
    const Matrix w = PlaceBound(link.right_end(), ask, bits).table(present.last(), 0);
    for (std::size_t i = 0; i < left.size(); ++i) bounds[i].push_back(closed(states[i], w, cutoffs.back()));
  }
  return bounds;
}

}  // namespace heraldgauge::reference::pair_number
