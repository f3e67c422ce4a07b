#include "compare/audit/known_point.hpp"

#include <algorithm>

#include "compare/audit/band.hpp"
#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::compare {
namespace {

using model::Chain;
using model::Expected;
using model::Quantity;
using model::QuantityKind;
using reference::Enclosure;
using reference::Result;

constexpr double bits_per_digit = 3.33;
constexpr int guard_bits = 32;
// Digits shown of a bound.
constexpr int shown_digits = 15;

Expected<std::vector<Result>> certify(const Subject& subject, const Chain& chain,
                                      const std::vector<Quantity>& quantities, int digits) {
  reference::Request request;
  request.quantities = quantities;
  request.pattern = subject.scenario.pattern;
  request.digits = digits;
  return reference::enclose(chain, request);
}

KnownValue known_value(const Result& result, int digits) {
  KnownValue value{result.status, result.reason, digits, result.enclosure, std::nullopt, {}};
  if (!value.exact) return value;
  value.coarse = rounded_outward(*value.exact, digits);
  value.shown = reference::decimals(*value.coarse, std::max(digits, shown_digits));
  return value;
}

std::optional<Enclosure> doubled(const Result& result) {
  if (!result.enclosure) return std::nullopt;
  return Enclosure{result.enclosure->lower * 2, result.enclosure->upper * 2};
}

// A capacity that is infinite is no bound: the reference calls it undefined or leaves it without an enclosure.
Expected<std::optional<DoubledCapacities>> doubled_capacities(const Subject& subject, const Chain& chain) {
  const auto is_rate = [](const Quantity& quantity) { return quantity.kind == QuantityKind::key_rate; };
  if (std::none_of(subject.quantities.begin(), subject.quantities.end(), is_rate))
    return std::optional<DoubledCapacities>();
  const auto results = certify(
      subject, chain, {{QuantityKind::capacity_arm}, {QuantityKind::capacity_chain}, {QuantityKind::capacity_point}},
      first_digits);
  if (!results) return results.faults();
  return std::optional(DoubledCapacities{doubled((*results)[0]), doubled((*results)[1]), doubled((*results)[2])});
}

KnownValue banded_value(const Subject& subject, const KnownPoint& point, std::size_t quantity, int digits) {
  const Band band = band_of(subject, point.changes, subject.quantities[quantity], digits);
  KnownValue value{band.status, band.reason, digits, band.attained, band.outer, {}};
  if (value.coarse) value.shown = reference::decimals(*value.coarse, shown_digits);
  return value;
}

reports::Parameters shown_parameters(const Changes& changes) {
  reports::Parameters parameters;
  for (const auto& [key, value] : changes) parameters.emplace_back(key, model::value_text(value));
  return parameters;
}

}  // namespace

Enclosure rounded_outward(const Enclosure& exact, int digits) {
  const auto bits = static_cast<reference::Precision>(bits_per_digit * digits) + guard_bits;
  const reference::Interval rounded(exact.lower, exact.upper, bits);
  return {rounded.lower(), rounded.upper()};
}

Expected<KnownPoint> know(const Subject& subject, Changes changes, int digits) {
  Expected<Chain> chain = model::chain_with(subject.scenario, changes);
  if (!chain) return chain.faults();
  auto capacities = doubled_capacities(subject, *chain);
  if (!capacities) return capacities.faults();
  KnownPoint point{shown_parameters(changes), std::move(changes), {}, std::move(capacities.value())};
  if (subject.rule.digitised) {
    for (std::size_t i = 0; i < subject.quantities.size(); ++i)
      point.values.push_back(banded_value(subject, point, i, digits));
    return point;
  }
  const auto results = certify(subject, *chain, subject.quantities, digits);
  if (!results) return results.faults();
  for (const Result& result : *results) point.values.push_back(known_value(result, digits));
  return point;
}

void refine(const Subject& subject, KnownPoint& point, std::size_t quantity, int digits) {
  if (subject.rule.digitised) {
    point.values[quantity] = banded_value(subject, point, quantity, digits);
    return;
  }
  const auto chain = model::chain_with(subject.scenario, point.changes);
  if (!chain) return;
  const auto results = certify(subject, *chain, {subject.quantities[quantity]}, digits);
  if (results) point.values[quantity] = known_value(results->front(), digits);
}

}  // namespace heraldgauge::compare
