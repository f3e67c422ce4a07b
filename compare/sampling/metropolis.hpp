#pragma once
// A walk through the pair numbers with the distribution that they have given the herald (Metropolis et al. 1953,
// Hastings 1970): one source gains or loses a pair at each step. What the ends see is averaged over the walk.

#include "compare/quantities_binary64.hpp"
#include "compare/sampling/trial.hpp"

namespace heraldgauge::compare {

struct Walk {
  std::uint64_t steps = 0;
  std::uint64_t accepted = 0;
  std::map<reference::Basis, reference::EndTable<double>> ends;  // mean probabilities given the herald
};

// Nothing where no start with up to two pairs a source can give a herald.
std::optional<Walk> metropolis_walk(TrialModel& trials, const model::Chain& chain,
                                    const std::vector<reference::Basis>& bases, std::uint64_t steps,
                                    std::uint64_t seed);

class WalkProbabilities : public Probabilities64 {
 public:
  explicit WalkProbabilities(const Walk& walk) : walk_(walk) {}
  double herald() override { return 1; }
  std::optional<double> pattern(const model::Pattern&) override { return std::nullopt; }
  std::optional<Extremes> coincidence() override { return std::nullopt; }
  reference::EndTable<double> ends(reference::Basis basis) override { return walk_.ends.at(basis); }

 private:
  const Walk& walk_;
};

}  // namespace heraldgauge::compare
