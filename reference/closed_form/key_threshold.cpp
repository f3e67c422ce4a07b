#include "reference/closed_form/key_threshold.hpp"

#include "reference/arithmetic/binary_entropy.hpp"
#include "reference/closed_form/sign_change.hpp"

namespace heraldgauge::reference::closed_form {
namespace {

// All of these have exactly one threshold between 1/100 and 1/5, with certain signs at both ends.
Interval threshold(const std::function<Interval(const Interval&)>& secret, Precision bits) {
  return *sign_change(secret, Rational(1, 100), Rational(1, 5), bits);
}

Interval log_ratio(const Interval& c) { return logarithm_1p(c) - logarithm_1p(-c); }  // ln((1+c)/(1-c))

}  // namespace

Interval bb84_threshold(const Rational& error_correction_factor, Precision bits) {
  const Interval spent(Rational(1 + error_correction_factor), bits);
  const Interval one(1L, bits);
  return threshold([&](const Interval& e) { return one - spent * binary_entropy(e); }, bits);
}

Interval six_state_threshold(Precision bits) {
  const Interval one(1L, bits), half(Rational(1, 2), bits);
  return threshold(
      [&](const Interval& e) {
        const Interval any = e * 3L * half;
        return one + (one - any) * binary_logarithm(one - any) + any * binary_logarithm(e * half);
      },
      bits);
}

Interval bb84_threshold_with_noise(Precision bits) {
  const Interval one(1L, bits);
  return threshold(
      [&](const Interval& e) {
        const Interval c = one - e * 2L;
        return power(c, 3) * 2L - (one - square(c)) * log_ratio(c);
      },
      bits);
}

Interval six_state_threshold_with_noise(Precision bits) {
  const Interval one(1L, bits);
  return threshold(
      [&](const Interval& e) {
        const Interval c = (one - e * 2L) / (one - e);
        return square(one - e * 2L) - e - (one - e) * (one - square(c)) / (c * 2L) * log_ratio(c);
      },
      bits);
}

Interval bb84_older_threshold(Precision bits) {
  const Interval one(1L, bits);
  return threshold([&](const Interval& e) { return one - binary_entropy(e) - binary_entropy(e * 2L); }, bits);
}

}  // namespace heraldgauge::reference::closed_form
