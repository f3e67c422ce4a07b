#include "reference/optics/dark_events.hpp"

namespace heraldgauge::reference {
namespace {

Interval to_the(const Interval& x, unsigned long n) { return power(x, n); }

Rational to_the(const Rational& x, unsigned long n) {
  Rational result;
  mpz_pow_ui(result.get_num_mpz_t(), x.get_num_mpz_t(), n);
  mpz_pow_ui(result.get_den_mpz_t(), x.get_den_mpz_t(), n);
  return result;
}

}  // namespace

template <class Number>
Number no_dark_event(const Field<Number>& field, std::span<const model::Detector> detectors,
                     const model::Background& background, unsigned silent) {
  Number factor = field(1L);
  model::Real efficiencies(0);
  for (std::size_t j = 0; j < detectors.size(); ++j) {
    if ((silent >> j & 1U) == 0) continue;
    multiply(factor, factor, field(model::Real(1) - detectors[j].dark_probability));
    efficiencies = efficiencies + detectors[j].registering_probability();
  }
  if (background.photons.is_zero() || efficiencies.is_zero()) return factor;
  const Rational shares = Rational(static_cast<long>(detectors.size())) * background.modes;
  const Number base = field(model::Real(1) + background.photons * efficiencies / model::Real(shares));
  divide(factor, factor, to_the(base, static_cast<unsigned long>(background.modes)));
  return factor;
}

template Interval no_dark_event(const Field<Interval>&, std::span<const model::Detector>, const model::Background&,
                                unsigned);
template Rational no_dark_event(const Field<Rational>&, std::span<const model::Detector>, const model::Background&,
                                unsigned);

}  // namespace heraldgauge::reference
