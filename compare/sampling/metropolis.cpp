#include "compare/sampling/metropolis.hpp"

#include <cmath>

namespace heraldgauge::compare {
namespace {

using reference::Basis;
using reference::EndTable;

double log_weight(TrialModel& trials, const PairNumbers& pairs) {
  const double prior = trials.log_probability(pairs);
  return std::isfinite(prior) ? prior + std::log(trials.herald(pairs)) : prior;
}

std::optional<PairNumbers> start(TrialModel& trials, std::size_t sources) {
  for (const long each : {1L, 2L, 0L}) {
    PairNumbers pairs(sources, each);
    if (std::isfinite(log_weight(trials, pairs))) return pairs;
  }
  return std::nullopt;
}

void add(EndTable<double>& sum, const EndTable<double>& joint, double herald) {
  for (std::size_t l = 0; l < 4; ++l) {
    for (std::size_t r = 0; r < 4; ++r) sum.joint[l][r] += joint.joint[l][r] / herald;
  }
}

}  // namespace

std::optional<Walk> metropolis_walk(TrialModel& trials, const model::Chain& chain, const std::vector<Basis>& bases,
                                    std::uint64_t steps, std::uint64_t seed) {
  const auto first = start(trials, chain.sources.size());
  if (!first) return std::nullopt;
  Random64 random(seed);
  PairNumbers pairs = *first;
  double weight = log_weight(trials, pairs);
  Walk walk;
  for (const Basis basis : bases) walk.ends[basis] = {};
  for (; walk.steps < steps; ++walk.steps) {
    PairNumbers next = pairs;
    next[random.below(next.size())] += random.uniform() < 0.5 ? 1 : -1;
    const double next_weight = log_weight(trials, next);
    if (std::log(random.uniform()) < next_weight - weight) {
      pairs = next;
      weight = next_weight;
      ++walk.accepted;
    }
    for (const Basis basis : bases) add(walk.ends[basis], trials.ends(pairs, basis), trials.herald(pairs));
  }
  for (auto& [basis, table] : walk.ends) {
    for (auto& row : table.joint) {
      for (double& entry : row) entry /= static_cast<double>(walk.steps);
    }
  }
  return walk;
}

}  // namespace heraldgauge::compare
