#include "compare/conventions/registry.hpp"

#include <algorithm>

namespace heraldgauge::compare {

Departure amplitude_transmittance();
Departure analyser_angle_doubled();
Departure analyser_angle_halved();
Departure dark_per_pair();
Departure double_clicks_dropped();
Departure efficiency_twice();
Departure ideal_error_correction();
Departure mean_pairs_as_parameter();
Departure mean_pairs_doubled();
Departure mean_pairs_per_pulse();
Departure natural_logarithm();
Departure neper_attenuation();
Departure per_herald_as_per_trial();
Departure sifting_left_out();
Departure squeezing_as_parameter();
Departure whole_length_per_arm();

const std::vector<Departure>& conventions() {
  static const std::vector<Departure> registry = {
      amplitude_transmittance(), neper_attenuation(),    whole_length_per_arm(),   mean_pairs_as_parameter(),
      squeezing_as_parameter(),  mean_pairs_per_pulse(), mean_pairs_doubled(),     dark_per_pair(),
      efficiency_twice(),        sifting_left_out(),     ideal_error_correction(), analyser_angle_doubled(),
      analyser_angle_halved(),   natural_logarithm(),    double_clicks_dropped(),  per_herald_as_per_trial(),
  };
  return registry;
}

const Departure* find_convention(std::string_view id) {
  const auto found = std::find_if(conventions().begin(), conventions().end(),
                                  [id](const Departure& departure) { return departure.id == id; });
  return found == conventions().end() ? nullptr : &*found;
}

}  // namespace heraldgauge::compare
