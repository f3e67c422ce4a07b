// The state after the herald from the cut sources, normalised to 1; the herald itself from all pairs.

#include "compare/fock/cut_sources.hpp"
#include "compare/formula.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;

bool is_of_herald_alone(const Quantity& quantity) {
  return quantity.kind == QuantityKind::herald_probability || quantity.kind == QuantityKind::trials_per_herald;
}

// The herald of the model laid over another evaluator.
Departure exact_herald() {
  return by_formula({}, [](const Case& point, const Quantity& quantity, Terms& terms) {
    const auto exact = [&](const Quantity& of_herald) {
      const CertifiedValue value = certified_values_of(point, {of_herald}, 20).front();
      if (!value.enclosure) return Term{value.status, value.reason, std::nullopt};
      return computed(reference::Interval(value.enclosure->lower, value.enclosure->upper, terms.bits()));
    };
    if (is_of_herald_alone(quantity)) return exact(quantity);
    if (quantity.kind != QuantityKind::key_rate) return terms.at(point, quantity);
    const Term fraction = terms.at(point, {QuantityKind::key_fraction});
    const Term herald = exact({QuantityKind::herald_probability});
    if (const auto missing = first_missing({&fraction, &herald})) return *missing;
    return computed(*fraction.value * *herald.value);
  });
}

}  // namespace

Departure pair_cutoff_after_herald() {
  Departure departure;
  departure.id = "pair-cutoff-after-herald";
  departure.sentence = "The state after the herald is cut at m pairs a source and normalised; the herald is not cut.";
  departure.replaces = "conditional quantities by those of cut sources, herald_probability kept";
  departure.claimed = "lam far below 1; three pairs are often called enough";
  departure.source = "common practice";
  departure.setting = fock::pairs_kept();
  departure.touches = [](const Quantity& quantity) {
    return touches_probabilities(quantity) && !is_of_herald_alone(quantity);
  };
  const Departure cut = fock::by_fock({}, {fock::cuts_as_set, [](fock::Description&, const Setting&) {}, nullptr});
  departure.enclose = [cut](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting,
                            int digits) {
    const CertifiedEvaluator inner = [&](const Case& same, const std::vector<Quantity>& asked, int more_digits) {
      return cut.enclose(same, asked, setting, more_digits);
    };
    return exact_herald().certified_rework(point, quantities, inner, digits);
  };
  departure.evaluate = [cut](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    const Evaluator inner = [&](const Case& same, const std::vector<Quantity>& asked) {
      return cut.evaluate(same, asked, setting);
    };
    return exact_herald().rework(point, quantities, inner);
  };
  return departure;
}

}  // namespace heraldgauge::compare
