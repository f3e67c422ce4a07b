#pragma once
// Exact numbers: GMP integers and rationals under the project's own names.

#include <gmpxx.h>

namespace heraldgauge::model {

using Integer = mpz_class;
using Rational = mpq_class;  // always canonical: lowest terms, positive denominator

}  // namespace heraldgauge::model
