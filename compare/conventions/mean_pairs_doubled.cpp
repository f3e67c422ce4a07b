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
  return by_edited_chain(std::move(departure), [](model::Chain& chain) { multiply_mean_pairs(chain, Real(2)); });
}

}  // namespace heraldgauge::compare
