#include "reference/closed_form/measurement_device_independent.hpp"

#include <functional>

namespace heraldgauge::reference::closed_form {
namespace {

// sum_{k >= first} c_k y^k / (k!)^2 for y >= 0 and coefficients 0 < c_k <= 1. Summed until the terms have sunk below
// the last place and at least halve from one to the next; the rest is then at most twice the first term left out.
Interval positive_series(const Interval& y, long first, const std::function<Rational(long)>& coefficient) {
  const Precision bits = y.precision();
  const Interval half(Rational(1, 2), bits);
  const Interval last_place = power(half, static_cast<unsigned long>(bits) + 20);
  Interval sum(0L, bits), weight(1L, bits);
  for (long k = 1;; ++k) {
    weight = weight * y / Interval(k * k, bits);
    if (k < first) continue;
    const bool halves = certainly_less(y / Interval((k + 1) * (k + 1), bits), half);
    const bool small = k >= bits || weight.is_exactly_zero() || certainly_less(weight, sum * last_place);
    if (halves && small) return raised(sum, weight * 2L);
    sum += weight * Interval(coefficient(k), bits);
  }
}

Interval missing(const Interval& dark, const Interval& mean) {  // 1 - (1-d) e^-mean
  const Interval one(1L, dark.precision());
  return dark - (one - dark) * exponential_m1(-mean);
}

Interval half_of(const Interval& x) { return x * Interval(Rational(1, 2), x.precision()); }

// 1 - 2 C(2k,k)/4^k, positive from k = 2 on.
Rational regrouped_coefficient(long k) {
  Rational central;
  mpz_bin_uiui(central.get_num_mpz_t(), 2 * static_cast<unsigned long>(k), static_cast<unsigned long>(k));
  mpq_div_2exp(central.get_mpq_t(), central.get_mpq_t(), 2 * static_cast<mp_bitcnt_t>(k));
  return 1 - 2 * central;
}

}  // namespace

Interval bessel_i0_minus_1(const Interval& x) {
  const Interval quarter = square(x) / Interval(4L, x.precision());
  return positive_series(quarter, 1, [](long) { return Rational(1); });
}

Gains mdi_rectilinear(const CoherentPair& pair) {
  const Precision bits = pair.dark.precision();
  const Interval one(1L, bits);
  const Interval sum = pair.mean_a + pair.mean_b;
  const Interval quiet = square(one - pair.dark) * exponential(-half_of(sum)) * 2L;
  const Interval two_x = square_root(pair.mean_a * pair.mean_b);
  const Interval correct = quiet * missing(pair.dark, half_of(pair.mean_a)) * missing(pair.dark, half_of(pair.mean_b));
  const Interval wrong = quiet * pair.dark * (bessel_i0_minus_1(two_x) + missing(pair.dark, half_of(sum)));
  return {correct + wrong, pair.flip * correct + (one - pair.flip) * wrong};
}

Gains mdi_diagonal(const CoherentPair& pair) {
  const Precision bits = pair.dark.precision();
  const Interval one(1L, bits);
  const Interval two_x = square_root(pair.mean_a * pair.mean_b);
  const Interval x = half_of(two_x);
  const Interval one_minus_y = missing(pair.dark, half_of(half_of(pair.mean_a + pair.mean_b)));
  const Interval y = one - one_minus_y;
  const Interval bracket =
      square(one_minus_y + bessel_i0_minus_1(x)) * 2L + positive_series(square(x), 2, regrouped_coefficient);
  const Interval events = square(y) * bracket * 2L;
  const Interval signal = (one - pair.flip * 2L) * square(y) * bessel_i0_minus_1(two_x);
  return {events, half_of(events) - signal};
}

template <class Number>
Number mdi_single_photon_yield(const Field<Number>& field, const SinglePhotons<Number>& pair) {
  const Number one = field(1L);
  const Number both = pair.eta_a * pair.eta_b;
  const Number quiet = (one - pair.dark) * (one - pair.dark);
  const Number one_dark = (field(2L) * (pair.eta_a + pair.eta_b) - field(3L) * both) * pair.dark;
  const Number two_dark = field(4L) * (one - pair.eta_a) * (one - pair.eta_b) * pair.dark * pair.dark;
  return quiet * (both / field(2L) + one_dark + two_dark);
}

template <class Number>
Number mdi_single_photon_errors(const Field<Number>& field, const SinglePhotons<Number>& pair) {
  const Number half = field(Rational(1, 2));
  const Number quiet = (field(1L) - pair.dark) * (field(1L) - pair.dark);
  return half * mdi_single_photon_yield(field, pair) - (half - pair.flip) * quiet * pair.eta_a * pair.eta_b * half;
}

template <class Number>
Number mdi_single_photon_rectilinear_errors(const Field<Number>& field, const SinglePhotons<Number>& pair) {
  const Number quiet = (field(1L) - pair.dark) * (field(1L) - pair.dark);
  return mdi_single_photon_errors(field, pair) + quiet * pair.eta_a * pair.eta_b * pair.dark / field(2L);
}

template Interval mdi_single_photon_yield(const Field<Interval>&, const SinglePhotons<Interval>&);
template Interval mdi_single_photon_errors(const Field<Interval>&, const SinglePhotons<Interval>&);
template Interval mdi_single_photon_rectilinear_errors(const Field<Interval>&, const SinglePhotons<Interval>&);

template Rational mdi_single_photon_yield(const Field<Rational>&, const SinglePhotons<Rational>&);
template Rational mdi_single_photon_errors(const Field<Rational>&, const SinglePhotons<Rational>&);
template Rational mdi_single_photon_rectilinear_errors(const Field<Rational>&, const SinglePhotons<Rational>&);

}  // namespace heraldgauge::reference::closed_form
