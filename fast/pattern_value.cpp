#include "fast/pattern_value.hpp"

#include <algorithm>
#include <cmath>

#include "fast/amount.hpp"
#include "fast/error_budget.hpp"
#include "fast/planner.hpp"
#include "fast/quantities.hpp"
#include "fast/run_kernel.hpp"

namespace heraldgauge::fast {
namespace {

constexpr model::Quantity pattern_probability{model::QuantityKind::pattern_probability};

bool counts_photons(const model::Pattern& pattern) {
  const auto counts = [](const model::Ask& ask) { return ask.kind == model::Ask::Kind::counts; };
  const auto any = [&](const auto& asks) { return std::any_of(asks.begin(), asks.end(), counts); };
  return any(pattern.left) || any(pattern.right) || std::any_of(pattern.stations.begin(), pattern.stations.end(), any);
}

struct PatternSum {
  Amount amount;
  long exponent;
};

PatternSum pattern_sum(const ExactModes& modes, Plan plan, double unit) {
  const auto signed_sum = run_kernel(plan, rounded_modes<DoubleDouble>({&modes.modes}));
  plan.majorant = true;
  const auto sizes = run_kernel(plan, rounded_modes<double>({&modes.modes}));
  const double size = std::ldexp(sizes.sums[0].value, static_cast<int>(sizes.exponent[0] - signed_sum.exponent[0]));
  if (size == 0) return {{}, 0};
  const double value = signed_sum.sums[0].value.hi;
  const double error = second_order * signed_sum.count * unit * size + half_ulp * std::fabs(value);
  return {{value, error, signed_sum.sums[0].tail}, signed_sum.exponent[0]};
}

}  // namespace

Value pattern_value(const ChainNumbers& numbers, const ExactModes& modes, std::vector<int> cutoffs,
                    const model::Pattern& pattern, double unit, double tail_allowed) {
  const auto declined = [](const char* reason) { return Value{pattern_probability, Status::declined, reason, {}, 0}; };
  if (counts_photons(pattern)) return declined("the pattern counts photons");
  PatternSum sum = pattern_sum(modes, make_pattern_plan(numbers, modes, pattern, cutoffs), unit);
  for (int i = 0; i < most_attempts && sum.amount.tail > tail_allowed * std::fabs(sum.amount.value); ++i) {
    const auto more = more_pairs(cutoffs, numbers);
    if (!more) break;
    cutoffs = *more;
    sum = pattern_sum(modes, make_pattern_plan(numbers, modes, pattern, cutoffs), unit);
  }
  if (sum.amount.is_zero()) return {pattern_probability, Status::computed, "", {}, 0};
  return {pattern_probability, Status::computed, "", scaled(sum.amount.value, sum.exponent), sum.amount.relative()};
}

}  // namespace heraldgauge::fast
