#include "compare/audit/band.hpp"

#include <algorithm>

namespace heraldgauge::compare {
namespace {

using model::Rational;
using reference::Enclosure;

constexpr int first_steps = 4;
constexpr int most_steps = 128;

int steps_for(int detail) { return std::min(first_steps * std::max(detail / first_digits, 1), most_steps); }

// The certified value at one position; nothing where the scenario does not allow the position.
std::optional<reference::Result> value_at(const Subject& subject, Changes changes, const model::Quantity& quantity,
                                          const Rational& position) {
  changes[*subject.axis].second = position;
  const auto chain = model::chain_with(subject.scenario, changes);
  if (!chain) return std::nullopt;
  reference::Request request;
  request.quantities = {quantity};
  request.pattern = subject.scenario.pattern;
  request.digits = first_digits;
  auto results = reference::enclose(*chain, request);
  if (!results) return std::nullopt;
  return std::move(results->front());
}

// The largest distance between neighbours.
Rational largest_step(const std::vector<Enclosure>& values) {
  Rational step = 0;
  for (std::size_t i = 1; i < values.size(); ++i) {
    step = std::max(
        {step, Rational(values[i].upper - values[i - 1].lower), Rational(values[i - 1].upper - values[i].lower)});
  }
  return step;
}

Band band_over(const std::vector<Enclosure>& values) {
  Band band;
  band.status = reference::Status::certified;
  Enclosure attained = values.front(), outer = values.front();
  for (const Enclosure& value : values) {
    attained.lower = std::min(attained.lower, value.upper);
    attained.upper = std::max(attained.upper, value.lower);
    outer.lower = std::min(outer.lower, value.lower);
    outer.upper = std::max(outer.upper, value.upper);
  }
  if (attained.upper < attained.lower) attained = outer;
  const Rational margin = values.size() > 1 ? largest_step(values) : Rational(0);
  band.attained = attained;
  band.outer = Enclosure{outer.lower - margin, outer.upper + margin};
  return band;
}

}  // namespace

Band band_of(const Subject& subject, const Changes& changes, const model::Quantity& quantity, int detail) {
  const Rational& centre = std::get<Rational>(changes[*subject.axis].second);
  const Acceptance reach = read_within(centre, subject.rule.digitised->x);
  const int steps = reach.lower == reach.upper ? 0 : steps_for(detail);
  std::vector<Enclosure> values;
  for (int i = 0; i <= steps; ++i) {
    const Rational position = steps == 0 ? centre : Rational(reach.lower + (reach.upper - reach.lower) * i / steps);
    const auto result = value_at(subject, changes, quantity, position);
    if (!result) continue;
    if (!result->enclosure) return {result->status, result->reason, std::nullopt, std::nullopt};
    values.push_back(*result->enclosure);
  }
  if (values.empty()) return {reference::Status::undefined, "no position within the tolerance is allowed", {}, {}};
  return band_over(values);
}

}  // namespace heraldgauge::compare
