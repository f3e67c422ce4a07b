#include "reference/pair_number/cutoffs.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "reference/pair_number/place_bound.hpp"
#include "reference/pair_number/source_weights.hpp"
#include "reference/pair_number/station_sequence.hpp"
#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

constexpr Precision bits = 53;
constexpr double nothing = -std::numeric_limits<double>::infinity();

double log2_of(const Interval& x) { return x.log2_mignitude(); }

double log2_sum(double a, double b) {
  const double larger = std::max(a, b);
  return larger == nothing ? nothing : larger + std::log2(std::exp2(a - larger) + std::exp2(b - larger));
}

// For each source the weight of its pair numbers n together with everything to the left of it, at provisional cut-offs.
using Shells = std::vector<std::vector<Interval>>;

std::vector<Interval> shell_sums(const Matrix& state) {
  std::vector<Interval> sums(static_cast<std::size_t>(state.rows()), Interval(bits));
  for (long a = 0; a < state.rows(); ++a) {
    for (long b = 0; a + b < state.rows(); ++b) sums[static_cast<std::size_t>(a + b)] += state(a, b);
  }
  return sums;
}

// What the left end lets pass, w for each state of source 0.
Matrix left_end_state(const HeraldedChain& link, const EndAsk& left, long cutoff) {
  const Matrix end = PlaceBound(link.left_end(), left, bits).table(cutoff, 0);
  Matrix state(cutoff + 1, cutoff + 1, bits);
  for (long a = 0; a < state.rows(); ++a) {
    for (long b = 0; a + b < state.rows(); ++b) state(a, b) = end(a + b, 0);
  }
  return state;
}

Shells left_shells(const HeraldedChain& link, const EndAsk& left, const std::vector<long>& cutoffs) {
  Matrix state = left_end_state(link, left, cutoffs.front());
  Shells shells;
  StationSequence stations(link, cutoffs, 0, bits);
  for (std::size_t k = 0;; ++k) {
    apply_weights(state, 0, state_weights(link.chain.sources[k], cutoffs[k], bits));
    shells.push_back(shell_sums(state));
    if (k == link.station_count()) return shells;
    Matrix next(cutoffs[k + 1] + 1, cutoffs[k + 1] + 1, bits);
    for (const Product& product : stations.at(k).products(0, Outcomes::corrected)) accumulate(next, product, state);
    state = std::move(next);
  }
}

Interval total(const std::vector<Interval>& values) {
  Interval sum(bits);
  for (const Interval& value : values) sum += value;
  return sum;
}

// The same weight at the last source, all pair numbers together, without those at the others.
double log2_herald_of(const HeraldedChain& link, const EndAsk& left, const std::vector<long>& cutoffs) {
  const SectorStack first{left_end_state(link, left, cutoffs.front())};
  const std::vector<SectorStack> last = contract_stations(link, cutoffs, Strings::corrected, {first}, bits);
  return log2_of(total(shell_sums(last.front().front())));
}

// log2 of the weight that everything on one side lends to n = 0..last pairs of a source: sum_m w(m, n) shells(m).
std::vector<double> lent_weights(const PlaceBound& place, const std::vector<Interval>& shells, long last,
                                 bool from_left) {
  const long others = static_cast<long>(shells.size()) - 1;
  const Matrix w = from_left ? place.table(others, last) : place.table(last, others);
  std::vector<double> weights;
  for (long n = 0; n <= last; ++n) {
    Interval sum(bits);
    for (long m = 0; m <= others; ++m) sum += (from_left ? w(m, n) : w(n, m)) * shells[static_cast<std::size_t>(m)];
    weights.push_back(log2_of(sum));
  }
  return weights;
}

// The least m with P(n > m) times the weights of both sides, w taken as 1, below the share.
long cutoff_without_places(const model::Source& source, double log2_sides, double log2_share) {
  long m = 1;
  while (log2_of(probability_beyond(source, m, bits)) + log2_sides > log2_share) m += 1 + m / 8;
  return m;
}

// What lies around each source, seen with provisional cut-offs.
struct Surroundings {
  Shells left, right;  // right: seen from the right end, source N first
};

Surroundings surroundings(const HeraldedChain& link, const EndAsk& left, const EndAsk& right,
                          const std::vector<long>& cutoffs) {
  return {left_shells(link, left, cutoffs), left_shells(mirrored(link), right, {cutoffs.rbegin(), cutoffs.rend()})};
}

// The least cut-off of source k that leaves at most the share beyond it, all other sources within their provisional
// ones.
long chosen_cutoff(const HeraldedChain& link, const std::vector<PlaceBound>& places, const Surroundings& around,
                   std::size_t k, double log2_share) {
  const model::Source& source = link.chain.sources[k];
  if (const std::optional<long> most = most_pairs(source)) return *most;
  const std::size_t last_source = link.source_count() - 1;
  const std::vector<Interval> vacuum{Interval(1L, bits)};  // an end is a place whose other side holds no photons
  const std::vector<Interval>& left = k == 0 ? vacuum : around.left[k - 1];
  const std::vector<Interval>& right = k == last_source ? vacuum : around.right[last_source - k - 1];
  const double log2_sides = log2_of(total(left)) + log2_of(total(right));
  const double log2_beyond_last = log2_share - 6;
  const long last = cutoff_without_places(source, log2_sides, log2_beyond_last);
  const std::vector<double> from_left = lent_weights(places[k], left, last, k > 0);
  const std::vector<double> from_right = lent_weights(places[k + 1], right, last, false);
  const std::vector<Interval> probabilities = pair_probabilities(source, last, bits);
  double beyond = log2_beyond_last;
  long m = last;
  while (m > 1) {
    const auto n = static_cast<std::size_t>(m);
    beyond = log2_sum(beyond, log2_of(probabilities[n]) + from_left[n] + from_right[n]);
    if (beyond > log2_share) break;
    --m;
  }
  return m;
}

// True where the provisional cut-offs were at least the chosen ones.
bool covers(const std::vector<long>& provisional, const std::vector<long>& chosen) {
  return std::equal(chosen.begin(), chosen.end(), provisional.begin(), std::less_equal<>());
}

}  // namespace

Cutoffs estimated_cutoffs(const HeraldedChain& link, const EndAsk& left, const EndAsk& right, double log2_tail) {
  std::vector<long> provisional;
  for (const model::Source& source : link.chain.sources) provisional.push_back(most_pairs(source).value_or(4));
  if (keep_all_pairs(link.chain.sources, provisional)) {
    return {provisional, log2_herald_of(link, left, provisional)};
  }
  const std::vector<PlaceBound> places = all_places(link, left, right, bits);
  const double log2_share = log2_tail - std::log2(2.0 * static_cast<double>(link.source_count()));
  double before = nothing;
  for (long size = 8;; size *= 2) {
    const Surroundings around = surroundings(link, left, right, provisional);
    const double herald = log2_of(total(around.left.back()));
    std::vector<long> chosen;
    for (std::size_t k = 0; k < link.source_count(); ++k) {
      chosen.push_back(chosen_cutoff(link, places, around, k, log2_share));
    }
    const bool settled = herald == before || herald - before < 0.25;
    if (settled || covers(provisional, chosen)) return {chosen, herald};
    before = herald;
    for (std::size_t k = 0; k < chosen.size(); ++k)
      provisional[k] = std::min(size, std::max(chosen[k], provisional[k]));
  }
}

std::vector<long> raised_cutoffs(const HeraldedChain& link, std::vector<long> pairs, double log2_reached,
                                 double log2_tail) {
  for (std::size_t k = 0; k < pairs.size(); ++k) {
    const model::Source& source = link.chain.sources[k];
    if (most_pairs(source)) continue;
    const double worth = -log2_of(enclose(source.pair_parameter, bits));
    const double missing = std::ceil((log2_reached - log2_tail) / worth);
    pairs[k] += std::max(1L, static_cast<long>(std::min(missing, 0.1 * static_cast<double>(pairs[k]))));
  }
  return pairs;
}

}  // namespace heraldgauge::reference::pair_number
