#pragma once
// Loss in decibel and what follows from it (definition: IEC 60027-3, ISO 80000).

#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::reference::closed_form {

Interval transmittance_of_decibel(const Interval& loss_db);  // 10^(-loss/10), loss >= 0 dB
Interval attenuation_length_km(const Interval& db_per_km);   // 10/(alpha ln 10), alpha > 0 dB/km
Interval attenuation_db_per_km(const Interval& loss_db, const Interval& length_km);  // length > 0 km

// d = A exp(B eta), the trade of efficiency against dark counts of an avalanche photodiode; d per trial, eta in [0,1].
// The form is from memory, its source not confirmed, and A, B are a device's own (A = 6.1e-7, B = 17 in use).
Interval dark_probability_at(const Interval& efficiency, const Interval& scale, const Interval& slope);

}  // namespace heraldgauge::reference::closed_form
