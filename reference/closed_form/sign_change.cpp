#include "reference/closed_form/sign_change.hpp"

namespace heraldgauge::reference::closed_form {
namespace {

int certain_sign(const Interval& x) {
  if (x.is_certainly_positive()) return 1;
  return x.is_certainly_negative() ? -1 : 0;
}

}  // namespace

std::optional<Interval> sign_change(const std::function<Interval(const Interval&)>& f, const Rational& lower,
                                    const Rational& upper, Precision bits) {
  const int first = certain_sign(f(Interval(lower, bits)));
  if (first == 0 || certain_sign(f(Interval(upper, bits))) != -first) return std::nullopt;
  Interval bracket(lower, upper, bits);
  for (Precision step = 0; step < bits; ++step) {
    const Interval middle = midpoint(bracket);
    const int sign = certain_sign(f(middle));
    if (sign == 0) break;
    bracket = sign == first ? hull(middle, upper_end(bracket)) : hull(lower_end(bracket), middle);
  }
  return bracket;
}

}  // namespace heraldgauge::reference::closed_form
