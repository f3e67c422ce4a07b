#pragma once
// Random exact rationals for arithmetic tests, from several distributions that hurt in different ways.

#include "reference/arithmetic/interval.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {

enum class Spread {
  uniform,          // binary64 numbers in [-1, 1]
  log_uniform,      // either sign, 1e-300 to 1e300
  small_fractions,  // p/q, |p|, q <= 100: rarely representable
  special,          // 0, +-1, powers of two, 1 +- 2^-k, 10^-k
};

model::Rational random_rational(Random& random, Spread spread);
// Of a spread drawn anew.
model::Rational random_rational(Random& random);

// An exact interval with the numbers inside it that a test tries: its ends, its middle and one at random. Often a
// point; else a relative width down to 1e-40. The second of a pair is near the first, or near its negative, one time in
// four.
struct ExactInterval {
  model::Rational lower, upper;
  std::vector<model::Rational> inside;
};
ExactInterval random_interval(Random& random);
std::pair<ExactInterval, ExactInterval> random_pair(Random& random);

}  // namespace heraldgauge::test
