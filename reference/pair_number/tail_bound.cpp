#include "reference/pair_number/tail_bound.hpp"

#include <algorithm>

#include "reference/pair_number/place_bound.hpp"
#include "reference/pair_number/source_weights.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

// lam (M+2)/(M+1) * product over the orders of (M+1)/(M+1-r)
Interval ratio_bound(const Interval& lam, long m, long first_order, long second_order) {
  const auto fraction = [&](long above, long below) {
    model::Rational value(above, below);
    value.canonicalize();
    return Interval(value, lam.precision());
  };
  return lam * fraction(m + 2, m + 1) * fraction(m + 1, m + 1 - first_order) * fraction(m + 1, m + 1 - second_order);
}

// The scalar chain of bound 2: for every n of the present source, the weight with no source beyond its cut-off so far,
// and with at least one.
struct Scalars {
  std::vector<Interval> within, beyond;
};

// One source: weights `inside` and `outside` arriving at n, times pi(n).
Scalars at_source(const std::vector<Interval>& probabilities, long cutoff, const Scalars& arriving) {
  Scalars result = arriving;
  for (std::size_t n = 0; n < probabilities.size(); ++n) {
    if (static_cast<long>(n) > cutoff) {
      result.beyond[n] += result.within[n];
      result.within[n] = Interval(result.within[n].precision());
    }
    result.within[n] *= probabilities[n];
    result.beyond[n] *= probabilities[n];
  }
  return result;
}

Scalars through_place(const Matrix& w, const Scalars& before) {
  const auto sum = [&w](const std::vector<Interval>& values, long column) {
    Interval total(values.front().precision());
    for (std::size_t n = 0; n < values.size(); ++n) total += w(static_cast<long>(n), column) * values[n];
    return total;
  };
  Scalars after;
  for (long column = 0; column < w.columns(); ++column) {
    after.within.push_back(sum(before.within, column));
    after.beyond.push_back(sum(before.beyond, column));
  }
  return after;
}

}  // namespace

std::vector<Interval> closed_pair_probabilities(const model::Source& source, long cutoff, long first_order,
                                                long second_order, Precision bits) {
  const std::optional<long> most = most_pairs(source);
  if (most && cutoff >= *most) return pair_probabilities(source, cutoff, bits);
  if (most) return pair_probabilities(source, *most, bits);
  const Interval lam = enclose(source.pair_parameter, bits);
  const Interval one(1L, bits);
  const Interval allowed = (one + lam) * Interval(model::Rational(1, 2), bits);
  long last = std::max({cutoff + 1, first_order, second_order});
  while (!certainly_less(ratio_bound(lam, last, first_order, second_order), allowed)) last += 1 + last / 8;
  std::vector<Interval> probabilities = pair_probabilities(source, last, bits);
  probabilities.back() /= one - ratio_bound(lam, last, first_order, second_order);
  return probabilities;
}

Interval tail_by_pair_numbers(const model::Chain& chain, const std::vector<long>& cutoffs, Precision bits) {
  Interval sum(bits);
  for (std::size_t k = 0; k < cutoffs.size(); ++k) sum += probability_beyond(chain.sources[k], cutoffs[k], bits);
  return sum;
}

Interval tail_by_places(const HeraldedChain& link, const std::vector<long>& cutoffs, const EndAsk& left,
                        const EndAsk& right, Precision bits) {
  const std::vector<PlaceBound> places = all_places(link, left, right, bits);
  const auto probabilities = [&](std::size_t k) {
    return closed_pair_probabilities(link.chain.sources[k], cutoffs[k], places[k].order(), places[k + 1].order(), bits);
  };
  std::vector<Interval> present = probabilities(0);
  Scalars state;
  const Matrix first = places[0].table(static_cast<long>(present.size()) - 1, 0);
  for (long n = 0; n < first.rows(); ++n) {
    state.within.push_back(first(n, 0));
    state.beyond.emplace_back(bits);
  }
  state = at_source(present, cutoffs[0], state);
  for (std::size_t k = 1; k < link.source_count(); ++k) {
    const std::vector<Interval> next = probabilities(k);
    const Matrix w = places[k].table(static_cast<long>(present.size()) - 1, static_cast<long>(next.size()) - 1);
    state = at_source(next, cutoffs[k], through_place(w, state));
    present = next;
  }
  const Matrix last = places.back().table(static_cast<long>(present.size()) - 1, 0);
  return through_place(last, state).beyond.front();
}

}  // namespace heraldgauge::reference::pair_number
