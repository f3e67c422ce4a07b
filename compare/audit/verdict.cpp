#include "compare/audit/verdict.hpp"

#include <algorithm>
#include <cmath>

#include "compare/digits.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;
using reference::Enclosure;

// Digits of the enclosure beyond those printed, so that the agreeing digits can be counted.
constexpr long spare_digits = 3;

JudgedNumber unreadable(const std::string& status, const std::string& reason) {
  JudgedNumber judged;
  judged.status = status;
  judged.reason = reason;
  return judged;
}

Judgement three_valued(const Acceptance& acceptance, const KnownValue& value) {
  const Judgement quick = judge(acceptance, *value.coarse);
  return quick == Judgement::undecided ? judge(acceptance, *value.exact) : quick;
}

// A reading agrees where some position and some height within the tolerances meet the curve.
Judgement judge_reading(const Acceptance& acceptance, const KnownValue& band) {
  const auto apart = [&](const Enclosure& range) {
    return range.upper < acceptance.lower || acceptance.upper < range.lower;
  };
  if (!apart(*band.exact)) return Judgement::agrees;
  return apart(*band.coarse) ? Judgement::differs : Judgement::undecided;
}

Verdict verdict_of(Judgement judgement) {
  switch (judgement) {
    case Judgement::agrees:
      return Verdict::agrees;
    case Judgement::differs:
      return Verdict::differs;
    case Judgement::undecided:
      break;
  }
  return Verdict::undecided;
}

bool certainly_above(const Rational& value, const std::optional<Enclosure>& bound) {
  return bound && value > bound->upper;
}

void compare_with_capacities(JudgedNumber& judged, const Subject& subject, const DoubledCapacities& capacities) {
  const PrintedNumber& number = *judged.number;
  const Rational least = subject.rule.digitised ? judged.acceptance.lower : Rational(number.value - number.half_unit);
  judged.above_chain = certainly_above(least, capacities.chain);
  judged.above_point = certainly_above(least, capacities.point);
  if (!certainly_above(least, capacities.arm)) return;
  judged.verdict = Verdict::impossible;
  judged.reason = "above 2 capacity_arm, which bounds every protocol";
}

// log10 of |x| for x != 0, to double precision, beyond binary64's exponents too.
double decimal_logarithm(const Rational& x) {
  long numerator_exponent = 0, denominator_exponent = 0;
  const double numerator = mpz_get_d_2exp(&numerator_exponent, x.get_num_mpz_t());
  const double denominator = mpz_get_d_2exp(&denominator_exponent, x.get_den_mpz_t());
  return std::log10(std::abs(numerator / denominator)) +
         static_cast<double>(numerator_exponent - denominator_exponent) * std::log10(2.0);
}

// The digits from the logarithm where that is clear of whole numbers, else nothing.
std::optional<long> clear_digits(const Rational& error, const Rational& middle, const Rational& width) {
  constexpr double clear = 1e-6;
  constexpr double sharp = -8;  // an enclosure of that size, beside the error, moves no digit that is clear
  const double size = decimal_logarithm(error);
  const double digits = decimal_logarithm(middle) - size;
  if (width != 0 && decimal_logarithm(width) - size > sharp) return std::nullopt;
  if (std::abs(digits - std::round(digits)) < clear) return std::nullopt;
  return std::clamp(static_cast<long>(std::floor(digits)), 0L, static_cast<long>(most_digits));
}

// Against the short enclosure where that is sharp enough, else against the whole one.
void measure(JudgedNumber& judged, const KnownValue& known) {
  const Rational& value = judged.number->value;
  for (const Enclosure* exact : {&*known.coarse, &*known.exact}) {
    const Rational middle = (exact->lower + exact->upper) / 2;
    if (exact->lower <= 0 && exact->upper >= 0) {
      judged.agreeing_digits = agreeing_digits(value, *exact);
      continue;
    }
    const Rational error = value - middle;
    const double size = error == 0 ? 0 : std::pow(10.0, decimal_logarithm(error) - decimal_logarithm(middle));
    if (std::isfinite(size)) judged.relative_error = (error < 0) != (middle < 0) ? -size : size;
    const auto digits = error == 0 ? std::nullopt : clear_digits(error, middle, exact->upper - exact->lower);
    judged.agreeing_digits = digits ? *digits : agreeing_digits(value, *exact);
    if (digits) return;
  }
}

// Digits that the known value should have: twice as many for a verdict that is open, some more than printed for a
// number that agrees.
int wanted_digits(const JudgedNumber& judged, const KnownValue& known, const Subject& subject) {
  if (judged.verdict == Verdict::undecided) return 2 * known.digits;
  if (judged.verdict != Verdict::agrees || subject.rule.digitised || known.exact->lower == known.exact->upper) return 0;
  const long wanted = std::min(judged.number->significant_digits, static_cast<long>(most_digits)) + spare_digits;
  return wanted > known.digits ? static_cast<int>(wanted) : 0;
}

}  // namespace

std::string verdict_text(Verdict verdict) {
  switch (verdict) {
    case Verdict::agrees:
      return "agrees";
    case Verdict::differs:
      return "differs";
    case Verdict::impossible:
      return "impossible";
    case Verdict::undecided:
      return "undecided";
    case Verdict::unreadable:
      break;
  }
  return "unreadable";
}

JudgedNumber judge_number(std::string_view text, const std::optional<Rational>& tolerance, const Subject& subject,
                          const KnownPoint& point, std::size_t quantity) {
  const std::string_view written = trimmed(text);
  if (is_not_a_number(written)) return unreadable("not-a-number", "it is not a finite number");
  auto number = read_printed(written);
  if (!number) return unreadable("malformed", number.faults().front().wrong);

  JudgedNumber judged;
  judged.number = std::move(number.value());
  judged.acceptance = accepted(*judged.number, tolerance, subject.quantities[quantity], subject.rule);
  judged.verdict = Verdict::undecided;
  const KnownValue& known = point.values[quantity];
  if (!known.exact) {
    judged.reason = known.reason;
  } else {
    judged.verdict = verdict_of(subject.rule.digitised ? judge_reading(judged.acceptance, known)
                                                       : three_valued(judged.acceptance, known));
    measure(judged, known);
    judged.wanted_digits = wanted_digits(judged, known, subject);
    if (judged.verdict == Verdict::undecided) judged.reason = "the tolerance ends within the enclosure";
  }
  const bool rate = subject.quantities[quantity].kind == model::QuantityKind::key_rate;
  if (rate && point.capacities) compare_with_capacities(judged, subject, *point.capacities);
  return judged;
}

}  // namespace heraldgauge::compare
