#include "compare/other_chain.hpp"
#include "compare/quantities_binary64.hpp"
#include "compare/sampling/departure.hpp"
#include "compare/sampling/metropolis.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;

bool is_conditional(const Quantity& quantity) {
  using enum model::QuantityKind;
  return is_sampled(quantity) && quantity.kind != herald_probability && quantity.kind != trials_per_herald &&
         quantity.kind != key_rate;
}

std::vector<Value> by_walk(const Case& point, const std::vector<Quantity>& quantities, std::uint64_t steps) {
  if (const auto reason = not_sampled(point.chain)) return declined(quantities, *reason);
  TrialModel trials(point.chain);
  const auto walk = metropolis_walk(trials, point.chain, bases_of(quantities), steps, sampling_seed);
  if (!walk) return declined(quantities, "no pair numbers were found from which a herald can come");
  WalkProbabilities probabilities(*walk);
  std::vector<Value> values = quantities_of(probabilities, point, quantities);
  for (Value& value : values) {
    if (!is_conditional(value.quantity)) {
      value = declined({value.quantity}, "a walk given the herald cannot tell it").front();
    }
    value.effort = std::to_string(walk->steps) + " steps, " + std::to_string(walk->accepted) + " accepted";
  }
  return values;
}

}  // namespace

Departure metropolis_pair_numbers() {
  Departure departure;
  departure.id = "metropolis-pair-numbers";
  departure.sentence =
      "Conditional quantities are averaged over a Metropolis-Hastings walk through the hidden pair numbers.";
  departure.replaces = "the average over pair numbers given the herald by that over a walk";
  departure.claimed = "walks much longer than their correlation time";
  departure.source = "common practice";
  departure.setting =
      SettingRange{"steps", "steps of the walk", 1, 100'000'000, true, 20'000, {2'000, 20'000, 200'000}};
  departure.touches = is_conditional;
  departure.value_is_the_machine_number = true;
  departure.trials = [](const Setting& setting, double herald_probability) {
    return setting->get_d() / herald_probability;  // each step is a heralded trial
  };
  departure.evaluate = [](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    return by_walk(point, quantities, setting->get_num().get_ui());
  };
  return departure;
}

}  // namespace heraldgauge::compare
