#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure squeezing_as_parameter() {
  Departure departure;
  departure.id = "squeezing-as-parameter";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The number meant as the pair parameter lam is used as the squeezing chi.";
  departure.replaces = "lam by tanh(lam)^2";
  departure.claimed = "nowhere; the two agree to first order at best";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  return by_edited_chain(std::move(departure), [](model::Chain& chain) {
    for_each_squeezed_source(chain, [](model::Source& source) {
      const model::Real amplitude = model::Real::hyperbolic_tangent(source.pair_parameter);
      source.pair_parameter = amplitude * amplitude;
    });
  });
}

}  // namespace heraldgauge::compare
