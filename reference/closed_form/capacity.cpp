#include "reference/closed_form/capacity.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Real;

// -ln(1-eta), eta in [0,1).
Interval nats(const Real& transmittance, Precision bits) {
  const Interval eta = enclose(transmittance, bits);
  if (certainly_less(eta, Interval(Rational(1, 2), bits))) return -logarithm_1p(-eta);
  return -logarithm(restricted(enclose(Real(1) - transmittance, bits), 0, 1));
}

Real all_arms(const Chain& chain) {
  Real product(1);
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    product = product * chain.left_arms[k].transmittance * chain.right_arms[k].transmittance;
  }
  return product;
}

// The smaller of two capacities, where none means infinite.
std::optional<Interval> worse(const std::optional<Interval>& a, const std::optional<Interval>& b) {
  if (!a) return b;
  if (!b) return a;
  return smaller_of(*a, *b);
}

}  // namespace

std::optional<Interval> pure_loss_capacity(const Real& transmittance, Precision bits) {
  if (transmittance.is_one()) return std::nullopt;
  return nats(transmittance, bits) / log_of_2(bits);
}

std::optional<Interval> loose_capacity(const Real& transmittance, Precision bits) {
  if (transmittance.is_one()) return std::nullopt;
  return (logarithm_1p(enclose(transmittance, bits)) + nats(transmittance, bits)) / log_of_2(bits);
}

std::optional<Interval> capacity_point(const Chain& chain, Precision bits) {
  return pure_loss_capacity(all_arms(chain), bits);
}

std::optional<Interval> capacity_loose(const Chain& chain, Precision bits) {
  return loose_capacity(all_arms(chain), bits);
}

std::optional<Interval> capacity_chain(const Chain& chain, Precision bits) {
  std::optional<Interval> worst;
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    const Real both_arms = chain.left_arms[k].transmittance * chain.right_arms[k].transmittance;
    worst = worse(worst, pure_loss_capacity(both_arms, bits));
  }
  return worst;
}

std::optional<Interval> capacity_arm(const Chain& chain, Precision bits) {
  std::optional<Interval> worst;
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    worst = worse(worst, pure_loss_capacity(chain.left_arms[k].transmittance, bits));
    worst = worse(worst, pure_loss_capacity(chain.right_arms[k].transmittance, bits));
  }
  return worst;
}

}  // namespace heraldgauge::reference
