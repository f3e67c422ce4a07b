#include "compare/shortcuts/registry.hpp"

#include <algorithm>

namespace heraldgauge::compare {

Departure dark_model_swap();
Departure lumped_arms();

const std::vector<Departure>& shortcuts() {
  static const std::vector<Departure> registry = {
      dark_model_swap(),
      lumped_arms(),
  };
  return registry;
}

const Departure* find_shortcut(std::string_view id) {
  const auto found = std::find_if(shortcuts().begin(), shortcuts().end(),
                                  [id](const Departure& departure) { return departure.id == id; });
  return found == shortcuts().end() ? nullptr : &*found;
}

}  // namespace heraldgauge::compare
