#include "compare/shortcuts/registry.hpp"

#include <algorithm>

namespace heraldgauge::compare {

Departure dark_model_swap();
Departure dark_overlap_dropped();
Departure distinguishable_pairs();
Departure error_from_visibility();
Departure error_gain_without_dark_factor();
Departure first_order_visibility();
Departure herald_product();
Departure leading_order();
Departure linear_capacity();
Departure linear_dark();
Departure linear_loss();
Departure low_efficiency_visibility();
Departure lumped_arms();
Departure metropolis_pair_numbers();
Departure no_double_dark();
Departure pair_chain_in_binary32();
Departure pair_cutoff();
Departure pair_cutoff_after_herald();
Departure pair_cutoff_per_mode();
Departure pair_cutoff_renormalised();
Departure poisson_pairs();
Departure resolving_detectors();
Departure shot_sampling();
Departure shot_sampling_to_error();
Departure single_pair();
Departure subset_sum_in_binary32();
Departure subset_sum_in_binary64();
Departure total_pair_cutoff();
Departure visibility_product();

const std::vector<Departure>& shortcuts() {
  static const std::vector<Departure> registry = {
      pair_cutoff(),
      pair_cutoff_renormalised(),
      pair_cutoff_per_mode(),
      total_pair_cutoff(),
      pair_cutoff_after_herald(),
      leading_order(),
      single_pair(),
      poisson_pairs(),
      distinguishable_pairs(),
      linear_loss(),
      resolving_detectors(),
      linear_dark(),
      no_double_dark(),
      dark_overlap_dropped(),
      dark_model_swap(),
      lumped_arms(),
      visibility_product(),
      herald_product(),
      error_gain_without_dark_factor(),
      error_from_visibility(),
      first_order_visibility(),
      low_efficiency_visibility(),
      linear_capacity(),
      subset_sum_in_binary64(),
      subset_sum_in_binary32(),
      pair_chain_in_binary32(),
      shot_sampling(),
      shot_sampling_to_error(),
      metropolis_pair_numbers(),
  };
  return registry;
}

const Departure* find_shortcut(std::string_view id) {
  const auto found = std::find_if(shortcuts().begin(), shortcuts().end(),
                                  [id](const Departure& departure) { return departure.id == id; });
  return found == shortcuts().end() ? nullptr : &*found;
}

}  // namespace heraldgauge::compare
