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
  const Real half(model::Rational(1, 2));
  return by_edited_chain(std::move(departure), [half](model::Chain& chain) { multiply_mean_pairs(chain, half); });
}

}  // namespace heraldgauge::compare
