// It acts on the scenario's attenuation and length, so it needs them. The arms that the length sets are those that a
// vanishing attenuation changes; the insertion loss stays in decibels.

#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;
using model::Real;

void attenuate_changed(std::vector<model::Arm>& arms, const std::vector<model::Arm>& before, const Real& fibre) {
  for (std::size_t k = 0; k < arms.size(); ++k) {
    if (!(arms[k] == before[k])) arms[k].transmittance = arms[k].transmittance * fibre;
  }
}

model::Expected<Case> in_nepers(const Case& point) {
  const std::string attenuation_key = "channel.attenuation_db_per_km";
  const auto length = number_in_force(point, "channel.length_km");
  const auto attenuation = number_in_force(point, attenuation_key);
  if (!length || !attenuation) {
    return model::Fault{{"", 0, 0, "neper-attenuation"}, "the channel is not given by a length", "channel.length_km"};
  }
  const auto lossless = case_with(point, attenuation_key, 0);
  if (!lossless) return lossless;
  Case other = *lossless;
  const Rational arms(static_cast<unsigned long>(2 * point.chain.sources.size()));
  const Real fibre = Real::exponential(Rational(-*attenuation * *length / arms));
  attenuate_changed(other.chain.left_arms, point.chain.left_arms, fibre);
  attenuate_changed(other.chain.right_arms, point.chain.right_arms, fibre);
  return other;
}

}  // namespace

Departure neper_attenuation() {
  Departure departure;
  departure.id = "neper-attenuation";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The attenuation in dB/km is used as if it were 1/km.";
  departure.replaces = "t = 10^(-a l/10) by t = exp(-a l)";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_everything;
  departure.transform = in_nepers;
  return by_other_chain(std::move(departure));
}

}  // namespace heraldgauge::compare
