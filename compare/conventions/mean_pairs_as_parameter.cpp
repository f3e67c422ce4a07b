#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

using model::Real;

Departure mean_pairs_as_parameter() {
  Departure departure;
  departure.id = "mean-pairs-as-parameter";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The number meant as the pair parameter lam is used as the mean pairs per polarisation mu.";
  departure.replaces = "lam by lam/(1+lam)";
  departure.claimed = "nowhere; the two agree to first order at best";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_squeezed_source(chain, [](model::Source& source) {
      const Real mu = source.pair_parameter;
      source.pair_parameter = mu / (Real(1) + mu);
    });
  });
}

}  // namespace heraldgauge::compare
