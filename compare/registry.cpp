#include "compare/registry.hpp"

namespace heraldgauge::compare {

const Departure* find_departure(std::string_view id) {
  for (const auto* registry : {&shortcuts(), &conventions()}) {
    for (const Departure& departure : *registry) {
      if (departure.id == id) return &departure;
    }
  }
  return nullptr;
}

}  // namespace heraldgauge::compare
