// Printed closed forms that drop a term, or hold to first order only.

#include "compare/key_formula.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using model::Rational;
using model::Real;
using reference::Interval;

bool touches_errors(const Quantity& quantity) {
  return quantity.kind == QuantityKind::qber_rectilinear || quantity.kind == QuantityKind::qber_diagonal ||
         touches_key(quantity);
}
bool touches_visibility(const Quantity& quantity) {
  return quantity.kind == QuantityKind::visibility || quantity.kind == QuantityKind::visibility_deficit;
}

// Both error rates changed by one map, everything else as in the model.
using ErrorRate = std::function<Term(const Case&, QuantityKind, Terms&)>;
Term with_errors(const Case& point, const Quantity& quantity, Terms& terms, const ErrorRate& rate) {
  if (!touches_errors(quantity)) return terms.at(point, quantity);
  if (!touches_key(quantity)) return rate(point, quantity.kind, terms);
  KeyInputs inputs = key_inputs(point, terms);
  inputs.rectilinear = rate(point, QuantityKind::qber_rectilinear, terms);
  inputs.diagonal = rate(point, QuantityKind::qber_diagonal, terms);
  return key_from(inputs, point.chain.protocol, quantity.kind, Interval(1L, terms.bits()));
}

// The exact error rate is 1/2 - S (1-d_A)(1-d_B)/Q with S the interference term; the printed one lacks (1-d_A)(1-d_B).
Term without_dark_factor(const Case& point, QuantityKind kind, Terms& terms) {
  const model::Chain& chain = point.chain;
  for (const model::End* end : {&chain.left_end, &chain.right_end}) {
    const bool served = end->detectors[0] == end->detectors[1] && end->background.photons.is_zero() &&
                        end->detectors[0].dark_model == model::DarkModel::independent;
    if (!served) return declined_term("detectors alike within an end and independent dark counts are needed");
  }
  if (chain.station_count() != 0) return declined_term("the formula is for a link without stations");
  const Term exact = terms.at(point, {kind});
  if (!exact.value) return exact;
  const auto quiet = [&](const model::End& end) {
    return reference::enclose(Real(1) - end.detectors[0].dark_probability, terms.bits());
  };
  const Interval half(Rational(1, 2), terms.bits());
  return computed(half - (half - *exact.value) / (quiet(chain.left_end) * quiet(chain.right_end)));
}

// (1 - V)/2 with the left analyser in the basis that the error rate belongs to.
Term half_deficit(const Case& point, QuantityKind kind, Terms& terms) {
  Case in_basis = point;
  in_basis.chain.left_end.analyser_deg = kind == QuantityKind::qber_diagonal ? 45 : 0;
  const Term deficit = terms.at(in_basis, {QuantityKind::visibility_deficit});
  return deficit.value ? computed(*deficit.value * Interval(Rational(1, 2), terms.bits())) : deficit;
}

// Mean pairs per polarisation, averaged over the sources; nothing for ideal pairs.
std::optional<Interval> mean_pairs_of(const model::Chain& chain, reference::Precision bits) {
  Interval sum(bits);
  for (const model::Source& source : chain.sources) {
    if (source.kind != model::SourceKind::squeezed) return std::nullopt;
    sum += reference::enclose(source.pair_parameter / (Real(1) - source.pair_parameter), bits);
  }
  return sum / Interval(static_cast<long>(chain.sources.size()), bits);
}

// A visibility that depends on the mean pairs alone, for no station and for one.
using OfMeanPairs = Interval (*)(const Interval& mu, std::size_t stations);
Term visibility_of_mean_pairs(const Case& point, const Quantity& quantity, Terms& terms, OfMeanPairs visibility) {
  if (!touches_visibility(quantity)) return terms.at(point, quantity);
  const auto mu = mean_pairs_of(point.chain, terms.bits());
  if (!mu || point.chain.station_count() > 1)
    return declined_term("squeezed sources and at most one station are needed");
  const Interval value = visibility(*mu, point.chain.station_count());
  return computed(quantity.kind == QuantityKind::visibility ? value : Interval(1L, terms.bits()) - value);
}

Departure printed(const std::string& id, const std::string& sentence, const std::string& replaces,
                  const std::string& claimed, const std::string& source, bool (*touches)(const Quantity&)) {
  Departure departure;
  departure.id = id;
  departure.sentence = sentence;
  departure.replaces = replaces;
  departure.claimed = claimed;
  departure.source = source;
  departure.touches = touches;
  return departure;
}

Interval product_of_arms(const model::Chain& chain, reference::Precision bits) {
  Interval product(1L, bits);
  for (const auto* arms : {&chain.left_arms, &chain.right_arms}) {
    for (const model::Arm& arm : *arms) product *= reference::enclose(arm.transmittance, bits);
  }
  return product;
}

// 1.44 eta (2.88 eta for the looser bound), eta as the capacity of that name means it.
Term linear_capacity_value(const Case& point, const Quantity& quantity, Terms& terms) {
  const model::Chain& chain = point.chain;
  const reference::Precision bits = terms.bits();
  const Interval slope(Rational(quantity.kind == QuantityKind::capacity_loose ? 288 : 144) / 100, bits);
  if (quantity.kind == QuantityKind::capacity_point || quantity.kind == QuantityKind::capacity_loose) {
    return computed(slope * product_of_arms(chain, bits));
  }
  if (!touches_capacities(quantity)) return terms.at(point, quantity);
  std::optional<Interval> worst;
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    const Interval left = reference::enclose(chain.left_arms[k].transmittance, bits);
    const Interval right = reference::enclose(chain.right_arms[k].transmittance, bits);
    const Interval here = quantity.kind == QuantityKind::capacity_chain ? left * right : smaller_of(left, right);
    worst = worst ? smaller_of(*worst, here) : here;
  }
  return computed(slope * *worst);
}

}  // namespace

Departure error_gain_without_dark_factor() {
  return by_formula(
      printed("error-gain-without-dark-factor",
              "The printed error gain of a source between two ends lets dark counts leave the interference term alone.",
              "E Q = Q/2 - S (1-d_A)(1-d_B) by E Q = Q/2 - S", "d far below 1",
              "Ma, Fung, Lo 2007 (formula from memory; the missing factor by own calculation)", touches_errors),
      [](const Case& point, const Quantity& quantity, Terms& terms) {
        return with_errors(point, quantity, terms, without_dark_factor);
      });
}

Departure error_from_visibility() {
  return by_formula(printed("error-from-visibility", "Each error rate is (1 - V)/2, V measured in its basis.",
                            "error rate by (1 - V)/2", "single pairs, alike detectors, no double clicks",
                            "common practice", touches_errors),
                    [](const Case& point, const Quantity& quantity, Terms& terms) {
                      return with_errors(point, quantity, terms, half_deficit);
                    });
}

Departure first_order_visibility() {
  return by_formula(
      printed("first-order-visibility", "The visibility to first order in the mean pairs, at vanishing efficiency.",
              "V by 1 - 2 mu without a station, 1 - 8 mu with one", "mu far below 1, eta -> 0, no dark counts",
              "one source: Scarani et al. 2005 (abstract read); one station: own expansion", touches_visibility),
      [](const Case& point, const Quantity& quantity, Terms& terms) {
        return visibility_of_mean_pairs(point, quantity, terms, [](const Interval& mu, std::size_t stations) {
          return Interval(1L, mu.precision()) - mu * (stations == 0 ? 2L : 8L);
        });
      });
}

Departure low_efficiency_visibility() {
  return by_formula(
      printed("low-efficiency-visibility", "The visibility to all orders in the mean pairs, at vanishing efficiency.",
              "V by (1+mu)/(1+3 mu) without a station, (1+mu)^2/(1+10 mu+17 mu^2) with one",
              "eta -> 0, no dark counts, equal sources",
              "one source: Takesue and Shimizu 2010 (from memory); one station: own calculation", touches_visibility),
      [](const Case& point, const Quantity& quantity, Terms& terms) {
        return visibility_of_mean_pairs(point, quantity, terms, [](const Interval& mu, std::size_t stations) {
          const Interval one(1L, mu.precision()), up = one + mu;
          return stations == 0 ? up / (one + mu * 3L) : up * up / (one + mu * 10L + mu * mu * 17L);
        });
      });
}

Departure linear_capacity() {
  return by_formula(printed("linear-capacity", "Capacities are taken proportional to the transmittance.",
                            "-log2(1-eta) by 1.44 eta, log2((1+eta)/(1-eta)) by 2.88 eta", "eta far below 1",
                            "common practice", touches_capacities),
                    linear_capacity_value);
}

}  // namespace heraldgauge::compare
