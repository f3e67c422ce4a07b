// The number given for a source is meant as one of lam, mu = lam/(1-lam) = sinh(chi)^2 per polarisation, 2 mu per
// pulse, or chi, and used as another. lam = mu/(1+mu) = tanh(chi)^2.

#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Real;

Real lam_of_mean_pairs(const Real& mu) { return mu / (Real(1) + mu); }
Real mean_pairs_of(const Real& lam) { return lam / (Real(1) - lam); }

// The departure in which every squeezed source's lam is replaced.
Departure by_pair_parameter(Departure departure, Real (*replaced)(const Real&)) {
  departure.kind = DepartureKind::convention;
  departure.claimed = "nowhere; the two agree to first order at best";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  departure.transform = [replaced](const Case& point) -> model::Expected<Case> {
    Case other = point;
    for_each_squeezed_source(other.chain,
                             [&](model::Source& source) { source.pair_parameter = replaced(source.pair_parameter); });
    return other;
  };
  return by_other_chain(std::move(departure));
}

}  // namespace

Departure mean_pairs_as_parameter() {
  Departure departure;
  departure.id = "mean-pairs-as-parameter";
  departure.sentence = "The number meant as the pair parameter lam is used as the mean pairs per polarisation mu.";
  departure.replaces = "lam by lam/(1+lam)";
  return by_pair_parameter(std::move(departure), [](const Real& lam) { return lam_of_mean_pairs(lam); });
}

Departure squeezing_as_parameter() {
  Departure departure;
  departure.id = "squeezing-as-parameter";
  departure.sentence = "The number meant as the pair parameter lam is used as the squeezing chi.";
  departure.replaces = "lam by tanh(lam)^2";
  return by_pair_parameter(std::move(departure), [](const Real& lam) {
    const Real amplitude = Real::hyperbolic_tangent(lam);
    return amplitude * amplitude;
  });
}

Departure mean_pairs_per_pulse() {
  Departure departure;
  departure.id = "mean-pairs-per-pulse";
  departure.sentence =
      "The mean pairs per polarisation are used as the mean pairs per pulse, both polarisations together.";
  departure.replaces = "mu by mu/2";
  return by_pair_parameter(std::move(departure),
                           [](const Real& lam) { return lam_of_mean_pairs(mean_pairs_of(lam) / Real(2)); });
}

Departure mean_pairs_doubled() {
  Departure departure;
  departure.id = "mean-pairs-doubled";
  departure.sentence = "The mean pairs per pulse, both polarisations together, are used as those per polarisation.";
  departure.replaces = "mu by 2 mu";
  return by_pair_parameter(std::move(departure),
                           [](const Real& lam) { return lam_of_mean_pairs(mean_pairs_of(lam) * Real(2)); });
}

}  // namespace heraldgauge::compare
