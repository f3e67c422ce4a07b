#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

using model::Real;

Departure mean_pairs_doubled() {
  Departure departure;
  departure.id = "mean-pairs-doubled";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The mean pairs per pulse, both polarisations together, are used as those per polarisation.";
  departure.replaces = "mu by 2 mu";
  departure.claimed = "nowhere; the two agree to first order at best";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_squeezed_source(chain, [](model::Source& source) {
      const Real lam = source.pair_parameter;
      source.pair_parameter = Real(2) * lam / (Real(1) + lam);  // mu = lam/(1-lam)
    });
  });
}

}  // namespace heraldgauge::compare
