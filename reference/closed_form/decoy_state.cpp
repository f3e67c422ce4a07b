#include "reference/closed_form/decoy_state.hpp"

#include "reference/arithmetic/binary_entropy.hpp"
#include "reference/closed_form/sign_change.hpp"

namespace heraldgauge::reference::closed_form {
namespace {

Interval signal(const CoherentLink& link, const Interval& mean) { return -exponential_m1(-link.eta * mean); }

Interval half_of(const Interval& x) { return x * Interval(Rational(1, 2), x.precision()); }

struct SinglePhoton {
  Interval yield, error_rate;
};

Interval rate(const CoherentLink& link, const Interval& mean, const KeyTerms& terms, const SinglePhoton& single) {
  const Interval one(1L, mean.precision());
  const Interval events = coherent_gain_printed(link, mean);
  const Interval error_rate = coherent_error_gain_printed(link, mean) / events;
  const Interval secret = single.yield * mean * exponential(-mean) * (one - binary_entropy(single.error_rate));
  return terms.sifting * (secret - events * terms.error_correction_factor * binary_entropy(error_rate));
}

}  // namespace

Interval poisson_probability(const Interval& mean, unsigned n) {
  Interval probability = exponential(-mean);
  for (long i = 1; i <= static_cast<long>(n); ++i) probability = probability * mean / Interval(i, mean.precision());
  return probability;
}

Interval coherent_gain_printed(const CoherentLink& link, const Interval& mean) {
  return link.background + signal(link, mean);
}

Interval coherent_gain(const CoherentLink& link, const Interval& mean) {
  const Interval clicks = signal(link, mean);
  return link.background * (Interval(1L, mean.precision()) - clicks) + clicks;
}

Interval coherent_error_gain_printed(const CoherentLink& link, const Interval& mean) {
  return half_of(link.background) + link.flip * signal(link, mean);
}

Interval infinite_decoy_rate(const CoherentLink& link, const Interval& mean, const KeyTerms& terms) {
  const Interval yield = link.background + link.eta;
  return rate(link, mean, terms, {yield, (half_of(link.background) + link.flip * link.eta) / yield});
}

Interval vacuum_and_weak_decoy_rate(const CoherentLink& link, const Interval& mean, const Interval& weak,
                                    const KeyTerms& terms) {
  const Interval share = square(weak) / square(mean);
  const Interval weak_gain = coherent_gain_printed(link, weak) * exponential(weak);
  const Interval bracket = weak_gain - coherent_gain_printed(link, mean) * exponential(mean) * share -
                           (Interval(1L, mean.precision()) - share) * link.background;
  const Interval yield = mean / (mean * weak - square(weak)) * bracket;
  const Interval errors = coherent_error_gain_printed(link, weak) * exponential(weak) - half_of(link.background);
  return rate(link, mean, terms, {yield, errors / (yield * weak)});
}

Interval optimal_mean_without_background(const Rational& flip, const Rational& error_correction_factor,
                                         Precision bits) {
  const Interval one(1L, bits);
  const Interval entropy = binary_entropy(Interval(flip, bits));
  const Interval target = Interval(error_correction_factor, bits) * entropy / (one - entropy);
  const auto excess = [&](const Interval& mean) { return (one - mean) * exponential(-mean) - target; };
  return *sign_change(excess, 0, 1, bits);
}

}  // namespace heraldgauge::reference::closed_form
