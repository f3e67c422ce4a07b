#include "compare/formula.hpp"

namespace heraldgauge::compare {

using model::Quantity;
using model::QuantityKind;

Departure per_herald_as_per_trial() {
  Departure departure;
  departure.id = "per-herald-as-per-trial";
  departure.kind = DepartureKind::convention;
  departure.sentence = "The key fraction per herald is quoted as the key rate per trial.";
  departure.replaces = "key_rate by key_fraction";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = [](const Quantity& quantity) { return quantity.kind == QuantityKind::key_rate; };
  return by_formula(std::move(departure), [](const Case& point, const Quantity& quantity, Terms& terms) {
    const bool rate = quantity.kind == QuantityKind::key_rate;
    return terms.at(point, rate ? Quantity{QuantityKind::key_fraction} : quantity);
  });
}

}  // namespace heraldgauge::compare
