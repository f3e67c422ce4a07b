#include "reference/pair_number/count_algebra.hpp"

#include <algorithm>
#include <cstdlib>

namespace heraldgauge::reference::pair_number {

CountAlgebra::CountAlgebra(const std::array<CountVariable, 2>& variables, long harmonics, Precision bits)
    : variables_(variables),
      first_(variables[0].top + 1),
      second_(variables[1].top + 1),
      harmonics_(harmonics),
      bits_(bits) {}

long CountAlgebra::reduced(std::size_t variable, long power) const {
  const CountVariable& rule = variables_[variable];
  if (rule.rule == CountVariable::Rule::idempotent) return std::min(power, rule.top);
  return power <= rule.top ? power : -1;
}

long CountAlgebra::place(const std::array<long, 2>& powers, long harmonic) const {
  const long first = reduced(0, powers[0]);
  const long second = reduced(1, powers[1]);
  if (first < 0 || second < 0 || std::labs(harmonic) > harmonics_) return -1;
  return (first * second_ + second) * (2 * harmonics_ + 1) + harmonic + harmonics_;
}

CountAlgebra::Multiplier CountAlgebra::multiplier(const Polynomial& factor) const {
  Multiplier result;
  for (const Monomial& monomial : factor) {
    if (monomial.coefficient.is_exactly_zero()) continue;
    Multiplier::Term term{
        monomial.coefficient, monomial.coefficient.lower() == 1 && monomial.coefficient.upper() == 1, {}};
    for (long first = 0; first < first_; ++first) {
      for (long second = 0; second < second_; ++second) {
        for (long harmonic = -harmonics_; harmonic <= harmonics_; ++harmonic) {
          term.targets.push_back(
              place({first + monomial.powers[0], second + monomial.powers[1]}, harmonic + monomial.harmonic));
        }
      }
    }
    result.terms_.push_back(std::move(term));
  }
  return result;
}

void CountAlgebra::Multiplier::multiply_add(Interval* out, const Interval* in, Interval& scratch) const {
  for (const Term& term : terms_) {
    for (std::size_t i = 0; i < term.targets.size(); ++i) {
      if (term.targets[i] < 0 || in[i].is_exactly_zero()) continue;
      Interval& target = out[term.targets[i]];
      if (term.is_one) {
        Interval::add(target, target, in[i]);
        continue;
      }
      Interval::multiply(scratch, term.coefficient, in[i]);
      Interval::add(target, target, scratch);
    }
  }
}

}  // namespace heraldgauge::reference::pair_number
