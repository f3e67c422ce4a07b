#include "reference/closed_form/direct_pair_link.hpp"

namespace heraldgauge::reference::closed_form {
namespace {

template <class Number>
Number squared(const Number& x) {
  return x * x;
}

template <class Number>
Number to_the(const Field<Number>& field, const Number& x, unsigned n) {
  Number result = field(1L);
  for (unsigned i = 0; i < n; ++i) result = result * x;
  return result;
}

// eta_a eta_b lambda (1+lambda) / [(1+eta_a lambda)(1+eta_b lambda) D]
template <class Number>
Number interference(const Field<Number>& field, const DirectPairLink<Number>& link) {
  const Number one = field(1L);
  const Number& lambda = link.mean_pairs;
  const Number a = one + link.eta_a * lambda;
  const Number b = one + link.eta_b * lambda;
  const Number both = one + lambda * (link.eta_a + link.eta_b - link.eta_a * link.eta_b);
  return link.eta_a * link.eta_b * lambda * (one + lambda) / (a * b * both);
}

template <class Number>
Number error_from(const Field<Number>& field, const DirectPairLink<Number>& link, const Number& events,
                  const Number& signal) {
  const Number half = field(Rational(1, 2));
  return half * events - field(2L) * (half - link.flip) * signal;
}

bool is_plain(const model::End& end) {
  return end.detectors[0] == end.detectors[1] && end.detectors[0].kind == model::DetectorKind::threshold &&
         end.background.photons.is_zero();
}

}  // namespace

template <class Number>
model::Expected<DirectPairLink<Number>> direct_pair_link_of(const Field<Number>& field, const model::Chain& chain) {
  const bool direct = chain.stations.empty() && chain.sources.front().kind == model::SourceKind::squeezed;
  if (!direct || !is_plain(chain.left_end) || !is_plain(chain.right_end)) {
    return model::Fault{{},
                        "the chain is not a direct pair link",
                        "no station, a squeezed source, two alike threshold detectors at each end, no background"};
  }
  const auto registered = [&](const model::End& end, const model::Arm& arm) {
    return field(arm.transmittance * end.detectors[0].registering_probability());
  };
  const auto no_dark = [&](const model::End& end) { return field(model::Real(1) - end.detectors[0].dark_probability); };
  const model::Real lam = chain.sources.front().pair_parameter;
  return DirectPairLink<Number>{field(lam / (model::Real(1) - lam)),
                                registered(chain.left_end, chain.left_arms.front()),
                                registered(chain.right_end, chain.right_arms.front()),
                                no_dark(chain.left_end),
                                no_dark(chain.right_end),
                                field(0L)};
}

template <class Number>
Number gain(const Field<Number>& field, const DirectPairLink<Number>& link) {
  const Number one = field(1L);
  const Number& lambda = link.mean_pairs;
  const Number a = link.no_dark_a / (one + link.eta_a * lambda);
  const Number b = link.no_dark_b / (one + link.eta_b * lambda);
  const Number both =
      link.no_dark_a * link.no_dark_b / (one + lambda * (link.eta_a + link.eta_b - link.eta_a * link.eta_b));
  return one - squared(a) - squared(b) + squared(both);
}

template <class Number>
Number error_gain_printed(const Field<Number>& field, const DirectPairLink<Number>& link) {
  return error_from<Number>(field, link, gain(field, link), interference(field, link));
}

template <class Number>
Number error_gain(const Field<Number>& field, const DirectPairLink<Number>& link) {
  const Number signal = link.no_dark_a * link.no_dark_b * interference(field, link);
  return error_from<Number>(field, link, gain(field, link), signal);
}

template <class Number>
Number pair_number_probability(const Field<Number>& field, const Number& mean_pairs, unsigned n) {
  const Number vacuum = field(1L) / (field(1L) + mean_pairs);
  const Number lam = mean_pairs * vacuum;
  return field(static_cast<long>(n) + 1) * to_the<Number>(field, lam, n) * squared(vacuum);
}

template <class Number>
Number yield(const Field<Number>& field, const DirectPairLink<Number>& link, unsigned n) {
  const Number one = field(1L);
  const Number silent_a = squared(link.no_dark_a) * to_the<Number>(field, one - link.eta_a, n);
  const Number silent_b = squared(link.no_dark_b) * to_the<Number>(field, one - link.eta_b, n);
  return (one - silent_a) * (one - silent_b);
}

template <class Number>
Number error_yield_printed(const Field<Number>& field, const DirectPairLink<Number>& link, unsigned n) {
  const Number one = field(1L);
  const Number a = one - link.eta_a;
  const Number b = one - link.eta_b;
  Number difference = field(0L);  // sum over i of (ab)^i - a^i b^(n-i)
  for (unsigned i = 0; i <= n; ++i) {
    const Number together = to_the<Number>(field, a * b, i);
    const Number apart = to_the<Number>(field, a, i) * to_the<Number>(field, b, n - i);
    difference = difference + together - apart;
  }
  return error_from<Number>(field, link, yield(field, link, n), difference / field(static_cast<long>(n) + 1));
}

template model::Expected<DirectPairLink<Interval>> direct_pair_link_of(const Field<Interval>&, const model::Chain&);
template model::Expected<DirectPairLink<Rational>> direct_pair_link_of(const Field<Rational>&, const model::Chain&);

template Interval gain(const Field<Interval>&, const DirectPairLink<Interval>&);
template Interval error_gain_printed(const Field<Interval>&, const DirectPairLink<Interval>&);
template Interval error_gain(const Field<Interval>&, const DirectPairLink<Interval>&);
template Interval pair_number_probability(const Field<Interval>&, const Interval&, unsigned);
template Interval yield(const Field<Interval>&, const DirectPairLink<Interval>&, unsigned);
template Interval error_yield_printed(const Field<Interval>&, const DirectPairLink<Interval>&, unsigned);

template Rational gain(const Field<Rational>&, const DirectPairLink<Rational>&);
template Rational error_gain_printed(const Field<Rational>&, const DirectPairLink<Rational>&);
template Rational error_gain(const Field<Rational>&, const DirectPairLink<Rational>&);
template Rational pair_number_probability(const Field<Rational>&, const Rational&, unsigned);
template Rational yield(const Field<Rational>&, const DirectPairLink<Rational>&, unsigned);
template Rational error_yield_printed(const Field<Rational>&, const DirectPairLink<Rational>&, unsigned);

}  // namespace heraldgauge::reference::closed_form
