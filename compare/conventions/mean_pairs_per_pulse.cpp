#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

using model::Real;

Departure mean_pairs_per_pulse() {
  Departure departure;
  departure.id = "mean-pairs-per-pulse";
  departure.kind = DepartureKind::convention;
  departure.sentence =
      "The mean pairs per polarisation are used as the mean pairs per pulse, both polarisations together.";
  departure.replaces = "mu by mu/2";
  departure.claimed = "nowhere; the two agree to first order at best";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_squeezed_source(chain, [](model::Source& source) {
      const Real lam = source.pair_parameter;
      source.pair_parameter = lam / (Real(2) - lam);  // mu = lam/(1-lam)
    });
  });
}

}  // namespace heraldgauge::compare
