#include "compare/sampling/sample.hpp"

#include <cmath>

namespace heraldgauge::compare {
namespace {

using reference::Basis;
using reference::EndTable;

// One of the 16 end outcomes by its conditional probability.
std::pair<std::size_t, std::size_t> drawn(const EndTable<double>& table, double herald, Random64& random) {
  double left = random.uniform() * herald;
  for (std::size_t l = 0; l < 4; ++l) {
    for (std::size_t r = 0; r < 4; ++r) {
      left -= table.joint[l][r];
      if (left < 0) return {l, r};
    }
  }
  return {0, 0};
}

}  // namespace

Counts sampled(TrialModel& trials, const std::vector<Basis>& bases, const Stop& stop, std::uint64_t seed) {
  Random64 random(seed);
  Counts counts;
  std::map<Basis, Random64> random_of_ends;  // apart, so that a count does not depend on what else is counted
  for (const Basis basis : bases) {
    counts.ends[basis] = {};
    random_of_ends.emplace(basis, Random64(seed + 1 + static_cast<std::uint64_t>(basis)));
  }
  const auto goes_on = [&] {
    return counts.trials < stop.trials && (stop.heralds == 0 || counts.heralds < stop.heralds);
  };
  PairNumbers pairs;
  while (goes_on()) {
    ++counts.trials;
    trials.draw_pairs(random, pairs);
    const double herald = trials.herald(pairs);
    if (!(random.uniform() < herald)) continue;
    ++counts.heralds;
    for (const Basis basis : bases) {
      const auto [l, r] = drawn(trials.ends(pairs, basis), herald, random_of_ends.at(basis));
      ++counts.ends[basis][l][r];
    }
  }
  return counts;
}

std::uint64_t heralds_for(double relative_standard_error) {
  return static_cast<std::uint64_t>(std::ceil(1 / (relative_standard_error * relative_standard_error)));
}

ConfidenceInterval wilson_interval(std::uint64_t successes, std::uint64_t trials) {
  const double z = 1.959963984540054;  // 97.5 % quantile of the normal distribution
  const auto n = static_cast<double>(trials);
  const double p = static_cast<double>(successes) / n;
  const double centre = p + z * z / (2 * n);
  const double half = z * std::sqrt(p * (1 - p) / n + z * z / (4 * n * n));
  return {(centre - half) / (1 + z * z / n), (centre + half) / (1 + z * z / n)};
}

}  // namespace heraldgauge::compare
