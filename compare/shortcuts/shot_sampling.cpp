#include "compare/sampling/departure.hpp"

namespace heraldgauge::compare {

Departure shot_sampling() {
  Departure departure;
  departure.id = "shot-sampling";
  departure.sentence = "Trials are simulated and counted.";
  departure.replaces = "a probability by a relative frequency";
  departure.claimed = "many heralds among the trials";
  departure.source = "common practice";
  departure.setting =
      SettingRange{"shots", "trials simulated", 1, 1'000'000'000, true, 100'000, {10'000, 100'000, 1'000'000}};
  departure.touches = is_sampled;
  departure.value_is_the_machine_number = true;
  departure.trials = [](const Setting& setting, double) { return setting->get_d(); };
  departure.evaluate = [](const Case& point, const std::vector<model::Quantity>& quantities, const Setting& setting) {
    return by_sample(point, quantities, {setting->get_num().get_ui(), 0});
  };
  return departure;
}

}  // namespace heraldgauge::compare
