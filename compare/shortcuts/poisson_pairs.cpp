#include "compare/fock/departure.hpp"
#include "compare/fock/weights.hpp"

namespace heraldgauge::compare {

Departure poisson_pairs() {
  Departure departure;
  departure.id = "poisson-pairs";
  departure.sentence = "Pair numbers are Poissonian of the same mean; the state of n pairs is unchanged.";
  departure.replaces = "(n+1) lam^n (1-lam)^2 by exp(-2 mu) (2 mu)^n / n!";
  departure.claimed = "many temporal modes, or lam far below 1";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto cuts = [](const model::Chain& chain, const Setting&, double log2_tail) {
    return fock::cuts_for_poisson(chain, log2_tail);
  };
  const auto change = [](fock::Description& description, const Setting&) {
    for (std::size_t k = 0; k < description.weights.size(); ++k) {
      const long most = static_cast<long>(description.weights[k].size()) - 1;
      description.weights[k] = fock::poisson_weights(description.chain.sources[k], most);
    }
  };
  return fock::by_fock(std::move(departure), {cuts, change, fock::tail_of_poisson});
}

}  // namespace heraldgauge::compare
