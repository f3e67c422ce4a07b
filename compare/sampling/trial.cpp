#include "compare/sampling/trial.hpp"

#include <algorithm>
#include <cmath>

#include "compare/fock/departure.hpp"
#include "compare/fock/weights.hpp"

namespace heraldgauge::compare {
namespace {

constexpr double log2_never = -60;  // pair numbers rarer than this are never drawn

}  // namespace

TrialModel::TrialModel(const model::Chain& chain) : chain_(chain) {
  const auto cuts = fock::cuts_for_model(chain, log2_never);
  for (std::size_t k = 0; k < cuts.size(); ++k) {
    double sum = 0;
    std::vector<double> cumulative;
    const auto weights = fock::model_weights(chain.sources[k], cuts[k]);
    for (std::size_t n = 0; n < weights.size(); ++n) {
      sum += static_cast<double>(n + 1) * to_binary64(weights[n]);
      cumulative.push_back(sum);
    }
    cumulative_.push_back(std::move(cumulative));
  }
}

void TrialModel::draw_pairs(Random64& random, PairNumbers& pairs) const {
  pairs.clear();
  for (const auto& cumulative : cumulative_) {
    const auto found = std::upper_bound(cumulative.begin(), cumulative.end(), random.uniform());
    pairs.push_back(std::min<long>(found - cumulative.begin(), static_cast<long>(cumulative.size()) - 1));
  }
}

double TrialModel::log_probability(const PairNumbers& pairs) const {
  double sum = 0;
  for (std::size_t k = 0; k < pairs.size(); ++k) {
    const auto n = static_cast<std::size_t>(pairs[k]);
    if (pairs[k] < 0 || n >= cumulative_[k].size()) return -INFINITY;
    sum += std::log(cumulative_[k][n] - (n == 0 ? 0 : cumulative_[k][n - 1]));
  }
  return sum;
}

// The chain whose sources emit exactly these numbers of pairs.
TrialModel::Known& TrialModel::known(const PairNumbers& pairs) {
  if (last_ == nullptr || last_->first != pairs) last_ = &*known_.try_emplace(pairs).first;
  Known& known = last_->second;
  if (known.chain) return known;
  fock::Description description;
  description.chain = chain_;
  for (const long n : pairs) {
    std::vector<model::Real> weights(static_cast<std::size_t>(n) + 1, model::Real(0));
    weights.back() = model::Real(model::Rational(1) / (n + 1));
    description.weights.push_back(std::move(weights));
  }
  known.chain = std::make_unique<fock::Chain<double>>(fock::Arithmetic<double>{}, description);
  known.herald = known.chain->herald().front();
  return known;
}

double TrialModel::herald(const PairNumbers& pairs) { return known(pairs).herald; }

const reference::EndTable<double>& TrialModel::ends(const PairNumbers& pairs, reference::Basis basis) {
  Known& known = this->known(pairs);
  const auto found = known.ends.find(basis);
  return found != known.ends.end() ? found->second
                                   : known.ends.emplace(basis, known.chain->ends(basis).front()).first->second;
}

}  // namespace heraldgauge::compare
