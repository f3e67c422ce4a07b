#include "compare/key_formula.hpp"

namespace heraldgauge::compare {

Departure natural_logarithm() {
  Departure departure;
  departure.id = "natural-logarithm";
  departure.kind = DepartureKind::convention;
  departure.sentence = "Entropies and capacities are taken in natural units and called bits.";
  departure.replaces = "log2 by ln";
  departure.claimed = "nowhere";
  departure.source = "common practice";
  departure.touches = [](const model::Quantity& quantity) {
    return touches_key(quantity) || touches_capacities(quantity);
  };
  return by_formula(std::move(departure), [](const Case& point, const model::Quantity& quantity, Terms& terms) {
    const reference::Interval unit = reference::log_of_2(terms.bits());
    if (touches_key(quantity)) return key_from(key_inputs(point, terms), point.chain.protocol, quantity.kind, unit);
    const Term term = terms.at(point, quantity);
    return term.value && touches_capacities(quantity) ? computed(*term.value * unit) : term;
  });
}

}  // namespace heraldgauge::compare
