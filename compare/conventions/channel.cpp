// Channel figures meant in one way and used in another. Those about a length act on the scenario's keys, so they need
// one.

#include "compare/chain_edits.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Expected;
using model::Fault;
using model::Rational;
using model::Real;

const std::string length_key = "channel.length_km";
const std::string attenuation_key = "channel.attenuation_db_per_km";

Departure channel_convention(const std::string& id, const std::string& sentence, const std::string& replaces) {
  Departure departure;
  departure.id = id;
  departure.kind = DepartureKind::convention;
  departure.sentence = sentence;
  departure.replaces = replaces;
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = touches_everything;
  return departure;
}

// The number in force for a key at a case: a swept or changed one before the scenario's own.
std::optional<Rational> number_in_force(const Case& point, const std::string& key) {
  if (point.scenario == nullptr) return std::nullopt;
  for (const auto& [changed, value] : point.changes) {
    if (changed == key && std::holds_alternative<Rational>(value)) return std::get<Rational>(value);
  }
  const auto found = point.scenario->settings.find(key);
  if (found == point.scenario->settings.end() || !std::holds_alternative<Rational>(found->second.value))
    return std::nullopt;
  return std::get<Rational>(found->second.value);
}

Fault no_length(const std::string& id) {
  return {{"", 0, 0, id}, "the channel is not given by a length and an attenuation", "channel.length_km"};
}

Expected<Case> with_setting(const Case& point, const std::string& key, const Rational& value) {
  auto changes = point.changes;
  std::erase_if(changes, [&](const auto& change) { return change.first == key; });
  changes.emplace_back(key, value);
  return case_with(*point.scenario, changes);
}

}  // namespace

Departure amplitude_transmittance() {
  Departure departure = channel_convention(
      "amplitude-transmittance", "The power transmittance of each arm is replaced by its square root.", "t by sqrt(t)");
  departure.transform = [](const Case& point) -> Expected<Case> {
    Case other = point;
    for_each_arm(other.chain, [](model::Arm& arm) { arm.transmittance = Real::square_root(arm.transmittance); });
    return other;
  };
  return by_other_chain(std::move(departure));
}

Departure whole_length_per_arm() {
  Departure departure = channel_convention("whole-length-per-arm", "Every arm is given the end-to-end length.",
                                           "l = D/(2(N+1)) by l = D");
  departure.transform = [](const Case& point) -> Expected<Case> {
    const auto length = number_in_force(point, length_key);
    if (!length) return no_length("whole-length-per-arm");
    const auto arms = static_cast<unsigned long>(2 * point.chain.sources.size());
    return with_setting(point, length_key, *length * arms);
  };
  return by_other_chain(std::move(departure));
}

// The arms that the length sets are those that a vanishing attenuation changes; the insertion loss stays in decibels.
Departure neper_attenuation() {
  Departure departure = channel_convention("neper-attenuation", "The attenuation in dB/km is used as if it were 1/km.",
                                           "t = 10^(-a l/10) by t = exp(-a l)");
  departure.transform = [](const Case& point) -> Expected<Case> {
    const auto length = number_in_force(point, length_key);
    const auto attenuation = number_in_force(point, attenuation_key);
    if (!length || !attenuation) return no_length("neper-attenuation");
    const auto lossless = with_setting(point, attenuation_key, 0);
    if (!lossless) return lossless;
    Case other = *lossless;
    const Rational arms(static_cast<unsigned long>(2 * point.chain.sources.size()));
    const Real fibre = Real::exponential(Rational(-*attenuation * *length / arms));
    const auto attenuate = [&](std::vector<model::Arm>& arms_now, const std::vector<model::Arm>& before) {
      for (std::size_t k = 0; k < arms_now.size(); ++k) {
        if (!(arms_now[k] == before[k])) arms_now[k].transmittance = arms_now[k].transmittance * fibre;
      }
    };
    attenuate(other.chain.left_arms, point.chain.left_arms);
    attenuate(other.chain.right_arms, point.chain.right_arms);
    return other;
  };
  return by_other_chain(std::move(departure));
}

}  // namespace heraldgauge::compare
