#include <algorithm>

#include "compare/sampling/departure.hpp"

namespace heraldgauge::compare {
namespace {

constexpr std::uint64_t most_trials = 5'000'000;

}  // namespace

using model::Rational;

Departure shot_sampling_to_error() {
  Departure departure;
  departure.id = "shot-sampling-to-error";
  departure.sentence = "Trials are simulated until the herald probability has the wanted standard error.";
  departure.replaces = "a probability by a relative frequency";
  departure.claimed = "where that many heralds can be waited for (it gives up after 5 million trials)";
  departure.source = "common practice";
  departure.setting =
      SettingRange{"error",          "relative standard error at which to stop", Rational(1, 1000), 1, false,
                   Rational(1, 100), {Rational(1, 10), Rational(1, 100)}};
  departure.touches = is_sampled;
  departure.value_is_the_machine_number = true;
  departure.trials = [](const Setting& setting, double herald_probability) {
    const auto heralds = static_cast<double>(heralds_for(setting->get_d()));
    return std::min(heralds / herald_probability, static_cast<double>(most_trials));
  };
  departure.evaluate = [](const Case& point, const std::vector<model::Quantity>& quantities, const Setting& setting) {
    return by_sample(point, quantities, {most_trials, heralds_for(setting->get_d())});
  };
  return departure;
}

}  // namespace heraldgauge::compare
