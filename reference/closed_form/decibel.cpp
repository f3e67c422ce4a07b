#include "reference/closed_form/decibel.hpp"

namespace heraldgauge::reference::closed_form {

Interval transmittance_of_decibel(const Interval& loss_db) {
  return power_of_ten(-loss_db / Interval(10L, loss_db.precision()));
}

Interval attenuation_length_km(const Interval& db_per_km) {
  const Interval ten(10L, db_per_km.precision());
  return ten / (db_per_km * logarithm(ten));
}

Interval attenuation_db_per_km(const Interval& loss_db, const Interval& length_km) { return loss_db / length_km; }

Interval dark_probability_at(const Interval& efficiency, const Interval& scale, const Interval& slope) {
  return scale * exponential(slope * efficiency);
}

}  // namespace heraldgauge::reference::closed_form
