#include "reference/closed_form/interference.hpp"

namespace heraldgauge::reference::closed_form {

template <class Number>
Extremes<Number> pair_coincidence(const Field<Number>& field, const Number& mean_pairs, const Number& eta_a,
                                  const Number& eta_b, const Number& d) {
  const Number one = field(1L);
  const Number no_dark = one - d;
  const Number a = no_dark / (one + eta_a * mean_pairs);
  const Number b = no_dark / (one + eta_b * mean_pairs);
  const Number both = no_dark * no_dark / (one + mean_pairs * (eta_a + eta_b - eta_a * eta_b));
  return {one - a - b + both, (one - a) * (one - b)};
}

template <class Number>
Number pair_visibility_weak(const Field<Number>& field, const Number& mean_pairs) {
  const Number mu = field(2L) * mean_pairs;
  return (mu + field(2L)) / (field(3L) * mu + field(2L));
}

template <class Number>
Number pair_visibility_distinguishable(const Field<Number>& field, const Number& mean_pairs) {
  return field(1L) / (field(1L) + field(2L) * mean_pairs);
}

namespace {

// Silent sets of the four detectors: what each herald (x1, x2) and each splitter output (t1, t2) lets pass
// unregistered. 1 / {[1+N-N x1 s][1+N-N x2 s] - N^2 x1 x2 D^2}, s = (t1+t2)/2, D = (t1-t2)/2 in the dip, 0 outside.
template <class Number>
Number silent_set(const Field<Number>& field, const Number& mean, const Number& x1, const Number& x2, const Number& t1,
                  const Number& t2, bool interferes) {
  const Number full = field(1L) + mean;
  const Number s = (t1 + t2) / field(2L);
  const Number difference = interferes ? Number((t1 - t2) / field(2L)) : field(0L);
  return field(1L) /
         ((full - mean * x1 * s) * (full - mean * x2 * s) - mean * mean * x1 * x2 * difference * difference);
}

template <class Number>
Number fourfold_clicks(const Field<Number>& field, const FourfoldLink<Number>& link, bool interferes) {
  const Number one = field(1L);
  Number total = field(0L);
  for (unsigned silent = 0; silent < 16; ++silent) {
    const auto passes = [&](unsigned bit, const Number& eta) { return (silent & bit) != 0 ? Number(one - eta) : one; };
    const auto quiet = [&](unsigned bit, const Number& d) { return (silent & bit) != 0 ? Number(d - one) : one; };
    const Number sign_and_dark = quiet(1, link.dark_herald) * quiet(2, link.dark_herald) * quiet(4, link.dark_signal) *
                                 quiet(8, link.dark_signal);
    total = total + sign_and_dark * silent_set<Number>(field, link.mean, passes(1, link.eta_herald),
                                                       passes(2, link.eta_herald), passes(4, link.eta_signal),
                                                       passes(8, link.eta_signal), interferes);
  }
  return total;
}

}  // namespace

template <class Number>
Extremes<Number> fourfold(const Field<Number>& field, const FourfoldLink<Number>& link) {
  return {fourfold_clicks(field, link, false), fourfold_clicks(field, link, true)};
}

template <class Number>
Number fourfold_visibility_weak(const Field<Number>& field, const Number& mean) {
  const Number numerator = field(1L) + field(2L) * mean;
  return numerator * numerator / (field(1L) + field(8L) * mean + field(10L) * mean * mean);
}

template Extremes<Interval> pair_coincidence(const Field<Interval>&, const Interval&, const Interval&, const Interval&,
                                             const Interval&);
template Interval pair_visibility_weak(const Field<Interval>&, const Interval&);
template Interval pair_visibility_distinguishable(const Field<Interval>&, const Interval&);
template Extremes<Interval> fourfold(const Field<Interval>&, const FourfoldLink<Interval>&);
template Interval fourfold_visibility_weak(const Field<Interval>&, const Interval&);

template Extremes<Rational> pair_coincidence(const Field<Rational>&, const Rational&, const Rational&, const Rational&,
                                             const Rational&);
template Rational pair_visibility_weak(const Field<Rational>&, const Rational&);
template Rational pair_visibility_distinguishable(const Field<Rational>&, const Rational&);
template Extremes<Rational> fourfold(const Field<Rational>&, const FourfoldLink<Rational>&);
template Rational fourfold_visibility_weak(const Field<Rational>&, const Rational&);

}  // namespace heraldgauge::reference::closed_form
