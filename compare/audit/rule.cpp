#include "compare/audit/rule.hpp"

#include <algorithm>

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

constexpr reference::Precision decade_bits = 64;

// 10^x rounded up: a reading tolerance is an opinion, its last bit is not.
Rational power_of_ten(const Rational& x) {
  return reference::power_of_ten(reference::Interval(x, decade_bits)).upper();
}

Acceptance as_budgeted(const PrintedNumber& number, const Limit& limit) {
  return within(number.value, limit.absolute.value_or(0), limit.relative.value_or(0));
}

}  // namespace

Acceptance within(const Rational& value, const Rational& absolute, const Rational& relative) {
  const Rational size = abs(value);
  Acceptance acceptance{value - absolute, value + absolute};
  if (relative * size <= absolute * (1 - relative)) return acceptance;
  Rational near = size / (1 + relative);
  Rational far = size / (1 - relative);
  if (value < 0) {
    std::swap(near, far);
    near = -near;
    far = -far;
  }
  acceptance.lower = std::min(acceptance.lower, near);
  acceptance.upper = std::max(acceptance.upper, far);
  return acceptance;
}

Acceptance read_within(const Rational& value, const ReadingTolerance& tolerance) {
  switch (tolerance.kind) {
    case ReadingTolerance::Kind::axis_units:
      return {value - tolerance.size, value + tolerance.size};
    case ReadingTolerance::Kind::relative: {
      const Rational share = abs(value) * tolerance.size;
      return {value - share, value + share};
    }
    case ReadingTolerance::Kind::decades:
      break;
  }
  const Rational factor = power_of_ten(tolerance.size);
  const Rational one = value / factor, other = value * factor;
  return {std::min(one, other), std::max(one, other)};
}

Acceptance accepted(const PrintedNumber& number, const std::optional<Rational>& tolerance,
                    const model::Quantity& quantity, const Rule& rule) {
  if (tolerance) return {number.value - *tolerance, number.value + *tolerance};
  if (rule.digitised) return read_within(number.value, rule.digitised->y);
  if (const auto limit = rule.budget.limit(quantity)) return as_budgeted(number, *limit);
  if (rule.relative || rule.absolute) {
    return within(number.value, rule.absolute.value_or(0), rule.relative.value_or(0));
  }
  if (rule.as_printed) return within(number.value, number.half_unit, 0);
  return within(number.value, number.half_unit, relative_floor);
}

Judgement judge(const Acceptance& acceptance, const reference::Enclosure& exact) {
  if (acceptance.lower <= exact.lower && exact.upper <= acceptance.upper) return Judgement::agrees;
  if (exact.upper < acceptance.lower || acceptance.upper < exact.lower) return Judgement::differs;
  return Judgement::undecided;
}

model::Expected<ReadingTolerance> read_tolerance(std::string_view text) {
  ReadingTolerance tolerance;
  if (text.ends_with('%')) {
    tolerance.kind = ReadingTolerance::Kind::relative;
    text.remove_suffix(1);
  } else if (text.ends_with("dec")) {
    tolerance.kind = ReadingTolerance::Kind::decades;
    text.remove_suffix(3);
  }
  model::Expected<Rational> size = model::parse_exact(trimmed(text));
  if (!size) return size.faults();
  if (tolerance.kind == ReadingTolerance::Kind::relative) *size = *size / 100;
  const bool too_large = tolerance.kind == ReadingTolerance::Kind::relative ? *size >= 1 : *size > 1000000;
  if (*size < 0 || too_large) {
    return model::Fault{
        {}, "a reading tolerance of " + std::string(text), "0 or more axis units, decades, or percent below 100"};
  }
  tolerance.size = *size;
  return tolerance;
}

}  // namespace heraldgauge::compare
