#include "reference/closed_form/two_mode_squeezed.hpp"

namespace heraldgauge::reference::closed_form {

template <class Number>
Number photon_number_probability(const Field<Number>& field, const Number& mean, unsigned n) {
  const Number ratio = mean / (field(1L) + mean);
  Number probability = field(1L) / (field(1L) + mean);
  for (unsigned i = 0; i < n; ++i) probability = probability * ratio;
  return probability;
}

template <class Number>
HeraldedMode<Number> heralded_mode(const Field<Number>& field, const Number& mean, const Number& eta, const Number& d) {
  const Number one = field(1L);
  const Number silent = one / (one + eta * mean);  // without dark counts
  const Number left = (one - d) * (one - eta) * silent * silent;
  const Number herald = one - (one - d) * silent;
  const Number first = mean * (one - left) / herald;
  const Number second = field(2L) * mean * mean * (one - left * (one - eta) * silent) / herald;
  return {herald, first, second / (first * first)};
}

template <class Number>
Number heralded_g2_first_order(const Field<Number>& field, const Number& mean, const Number& eta) {
  return field(2L) * mean * (field(2L) - eta);
}

template <class Number>
Number click_g2(const Field<Number>& field, const Number& mean, const Detection<Number>& herald,
                const Detection<Number>& signal) {
  const Number one = field(1L);
  const Number zero = field(0L);
  // No click at the heralding detector (x: its loss) and at the signal detectors that see the share of the mode.
  const auto silent = [&](const Number& x, const Number& share) -> Number {
    return one / (one + mean - mean * (one - x) * (one - share));
  };
  const Number quiet_herald = one - herald.d;
  const Number quiet = one - signal.d;
  const Number half = signal.eta / field(2L);
  const Number h = one - quiet_herald * silent(herald.eta, zero);
  // Probability that the herald clicks and this share of the signal stays silent.
  const auto with_silent = [&](const Number& share) -> Number {
    return silent(zero, share) - quiet_herald * silent(herald.eta, share);
  };
  const Number one_click = h - quiet * with_silent(half);
  const Number two_clicks = h - field(2L) * quiet * with_silent(half) + quiet * quiet * with_silent(signal.eta);
  return two_clicks * h / (one_click * one_click);
}

template Interval photon_number_probability(const Field<Interval>&, const Interval&, unsigned);
template HeraldedMode<Interval> heralded_mode(const Field<Interval>&, const Interval&, const Interval&,
                                              const Interval&);
template Interval heralded_g2_first_order(const Field<Interval>&, const Interval&, const Interval&);
template Interval click_g2(const Field<Interval>&, const Interval&, const Detection<Interval>&,
                           const Detection<Interval>&);

template Rational photon_number_probability(const Field<Rational>&, const Rational&, unsigned);
template HeraldedMode<Rational> heralded_mode(const Field<Rational>&, const Rational&, const Rational&,
                                              const Rational&);
template Rational heralded_g2_first_order(const Field<Rational>&, const Rational&, const Rational&);
template Rational click_g2(const Field<Rational>&, const Rational&, const Detection<Rational>&,
                           const Detection<Rational>&);

}  // namespace heraldgauge::reference::closed_form
