#pragma once
// One simulated trial: the pair numbers of all sources are drawn, then what the stations and ends do given those.
// Nothing here knows the probabilities averaged over the pair numbers, so a sample is a sample.

#include <map>
#include <optional>
#include <vector>

#include "compare/fock/chain.hpp"
#include "compare/sampling/random.hpp"

namespace heraldgauge::compare {

using PairNumbers = std::vector<long>;

class TrialModel {
 public:
  // Without shared background.
  explicit TrialModel(const model::Chain& chain);

  // Draws into `pairs`, which keeps its memory from trial to trial.
  void draw_pairs(Random64& random, PairNumbers& pairs) const;
  // log of the probability of these pair numbers; -infinity where they cannot occur.
  double log_probability(const PairNumbers& pairs) const;

  // Given the pair numbers: probability of the herald, and with it that of exactly these end clicks.
  double herald(const PairNumbers& pairs);
  const reference::EndTable<double>& ends(const PairNumbers& pairs, reference::Basis basis);

 private:
  struct Known {
    std::unique_ptr<fock::Chain<double>> chain;
    double herald = 0;
    std::map<reference::Basis, reference::EndTable<double>> ends;
  };
  Known& known(const PairNumbers& pairs);

  model::Chain chain_;
  std::vector<std::vector<double>> cumulative_;  // of the pair numbers of each source
  std::map<PairNumbers, Known> known_;
  std::map<PairNumbers, Known>::value_type* last_ = nullptr;  // the same numbers often come again
};

}  // namespace heraldgauge::compare
