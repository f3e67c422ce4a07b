// Shortcuts about the number of pairs that a source emits.

#include "compare/fock/departure.hpp"
#include "compare/fock/weights.hpp"
#include "compare/formula.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using fock::Description;
using model::Chain;
using model::Real;

SettingRange pairs_kept() { return {"m", "pairs kept", 0, 40, true, 3, {1, 2, 3, 4, 5, 6, 8, 10}}; }

long kept(const Setting& setting) { return setting->get_num().get_si(); }

std::vector<long> own_cuts(const Chain& chain, const Setting& setting, double) {
  return std::vector<long>(chain.sources.size(), kept(setting));
}

Departure cut_off(const std::string& id, const std::string& sentence, const std::string& replaces) {
  Departure departure;
  departure.id = id;
  departure.sentence = sentence;
  departure.replaces = replaces;
  departure.claimed = "lam far below 1; three pairs are often called enough";
  departure.source = "common practice";
  departure.setting = pairs_kept();
  departure.touches = touches_probabilities;
  return departure;
}

bool is_of_herald_alone(const model::Quantity& quantity) {
  return quantity.kind == model::QuantityKind::herald_probability ||
         quantity.kind == model::QuantityKind::trials_per_herald;
}

// The herald of the model laid over another evaluator.
Departure exact_herald() {
  return by_formula({}, [](const Case& point, const model::Quantity& quantity, Terms& terms) {
    const auto exact = [&](const model::Quantity& of_herald) {
      const CertifiedValue value = certified_values_of(point, {of_herald}, 20).front();
      if (!value.enclosure) return Term{value.status, value.reason, std::nullopt};
      return computed(reference::Interval(value.enclosure->lower, value.enclosure->upper, terms.bits()));
    };
    if (is_of_herald_alone(quantity)) return exact(quantity);
    if (quantity.kind != model::QuantityKind::key_rate) return terms.at(point, quantity);
    const Term fraction = terms.at(point, {model::QuantityKind::key_fraction});
    const Term herald = exact({model::QuantityKind::herald_probability});
    if (const auto missing = first_missing({&fraction, &herald})) return *missing;
    return computed(*fraction.value * *herald.value);
  });
}

}  // namespace

Departure pair_cutoff() {
  return fock::by_fock(
      cut_off("pair-cutoff", "Each source keeps at most m pairs, H and V together; nothing is renormalised.",
              "the sum over all pair numbers by n_k <= m"),
      {own_cuts, [](Description&, const Setting&) {}, nullptr});
}

Departure pair_cutoff_renormalised() {
  const auto change = [](Description& description, const Setting&) {
    for (auto& weights : description.weights) weights = fock::renormalised(weights);
  };
  return fock::by_fock(
      cut_off("pair-cutoff-renormalised", "Each source keeps at most m pairs, and its kept amplitudes are normalised.",
              "pi(n) by pi(n) / P(n <= m)"),
      {own_cuts, change, nullptr});
}

Departure pair_cutoff_per_mode() {
  const auto cuts = [](const Chain& chain, const Setting& setting, double) {
    return std::vector<long>(chain.sources.size(), 2 * kept(setting));
  };
  const auto change = [](Description& description, const Setting& setting) {
    description.most_per_mode = kept(setting);
  };
  Departure departure = cut_off("pair-cutoff-per-mode", "Each mode, H and V apart, keeps at most m photons.",
                                "the sum over all photon numbers by h_k <= m and v_k <= m");
  departure.setting->largest = 20;
  return fock::by_fock(std::move(departure), {cuts, change, nullptr});
}

Departure total_pair_cutoff() {
  Departure departure = cut_off("total-pair-cutoff", "All sources together keep at most m pairs.",
                                "the sum over all pair numbers by n_0 + ... + n_N <= m");
  departure.setting->standard = 6;
  departure.setting->largest = 24;
  const auto change = [](Description& description, const Setting& setting) { description.most_total = kept(setting); };
  return fock::by_fock(std::move(departure), {own_cuts, change, nullptr});
}

// The state after the herald from the cut sources, normalised to 1; the herald itself from all pairs.
Departure pair_cutoff_after_herald() {
  Departure departure =
      cut_off("pair-cutoff-after-herald",
              "The state after the herald is cut at m pairs a source and normalised; the herald is not cut.",
              "conditional quantities by those of cut sources, herald_probability kept");
  departure.touches = [](const model::Quantity& quantity) {
    return touches_probabilities(quantity) && !is_of_herald_alone(quantity);
  };
  const Departure cut = pair_cutoff();
  departure.enclose = [cut](const Case& point, const std::vector<model::Quantity>& quantities, const Setting& setting,
                            int digits) {
    const CertifiedEvaluator inner = [&](const Case& same, const std::vector<model::Quantity>& asked, int more_digits) {
      return cut.enclose(same, asked, setting, more_digits);
    };
    return exact_herald().certified_rework(point, quantities, inner, digits);
  };
  departure.evaluate = [cut](const Case& point, const std::vector<model::Quantity>& quantities,
                             const Setting& setting) {
    const Evaluator inner = [&](const Case& same, const std::vector<model::Quantity>& asked) {
      return cut.evaluate(same, asked, setting);
    };
    return exact_herald().rework(point, quantities, inner);
  };
  return departure;
}

Departure single_pair() {
  Departure departure;
  departure.id = "single-pair";
  departure.sentence = "A source that emits at all emits exactly one pair.";
  departure.replaces = "pi(n) by pi(0), 1 - pi(0), 0, ...";
  departure.claimed = "lam far below 1";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto cuts = [](const Chain& chain, const Setting&, double) {
    return std::vector<long>(chain.sources.size(), 1);
  };
  const auto change = [](Description& description, const Setting&) {
    for (auto& weights : description.weights) weights[1] = (Real(1) - weights[0]) / Real(2);
  };
  return fock::by_fock(std::move(departure), {cuts, change, nullptr});
}

Departure poisson_pairs() {
  Departure departure;
  departure.id = "poisson-pairs";
  departure.sentence = "Pair numbers are Poissonian of the same mean; the state of n pairs is unchanged.";
  departure.replaces = "(n+1) lam^n (1-lam)^2 by exp(-2 mu) (2 mu)^n / n!";
  departure.claimed = "many temporal modes, or lam far below 1";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto cuts = [](const Chain& chain, const Setting&, double log2_tail) {
    return fock::cuts_for_poisson(chain, log2_tail);
  };
  const auto change = [](Description& description, const Setting&) {
    for (std::size_t k = 0; k < description.weights.size(); ++k) {
      const long most = static_cast<long>(description.weights[k].size()) - 1;
      description.weights[k] = fock::poisson_weights(description.chain.sources[k], most);
    }
  };
  return fock::by_fock(std::move(departure), {cuts, change, fock::tail_of_poisson});
}

}  // namespace heraldgauge::compare
