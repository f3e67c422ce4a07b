#include "reference/closed_form/threshold_detector.hpp"

namespace heraldgauge::reference::closed_form {

template <class Number>
Number silent_probability(const Field<Number>& field, model::DarkModel dark_model, const Number& eta, const Number& d,
                          unsigned n) {
  const Number no_dark = field(1L) - d;
  const Number registering = dark_model == model::DarkModel::thermal ? Number(eta * no_dark) : eta;
  const Number missed = field(1L) - registering;
  Number silent = no_dark;
  for (unsigned i = 0; i < n; ++i) silent = silent * missed;
  return silent;
}

template Interval silent_probability(const Field<Interval>&, model::DarkModel, const Interval&, const Interval&,
                                     unsigned);
template Rational silent_probability(const Field<Rational>&, model::DarkModel, const Rational&, const Rational&,
                                     unsigned);

}  // namespace heraldgauge::reference::closed_form
