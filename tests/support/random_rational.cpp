#include "tests/support/random_rational.hpp"

#include <cmath>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

using model::Rational;

Rational power(const Rational& base, unsigned long exponent) {
  Rational result;
  mpz_pow_ui(result.get_num_mpz_t(), base.get_num_mpz_t(), exponent);
  mpz_pow_ui(result.get_den_mpz_t(), base.get_den_mpz_t(), exponent);
  return result;
}

Rational sign(Random& random) { return random() % 2 == 0 ? 1 : -1; }

Rational fraction(Random& random) {
  Rational value(static_cast<long>(random() % 100) + 1, static_cast<long>(random() % 100) + 1);
  value.canonicalize();
  return value;
}

Rational special(Random& random) {
  const unsigned long k = random() % 300;
  switch (random() % 5) {
    case 0:
      return 0;
    case 1:
      return 1;
    case 2:
      return power(2, k);
    case 3:
      return 1 + sign(random) * power(Rational(1, 2), k);
    default:
      return power(Rational(1, 10), k);
  }
}

ExactInterval around(Random& random, const Rational& centre) {
  Rational width = random() % 3 == 0 ? Rational(0) : abs(centre) * Rational(log_uniform(random, 1e-40, 10));
  if (centre == 0 && random() % 2 == 0) width = Rational(log_uniform(random, 1e-40, 10));
  ExactInterval interval{centre - width * Rational(uniform(random, 0, 1)), 0, {}};
  interval.upper = interval.lower + width;
  const Rational somewhere = interval.lower + width * Rational(uniform(random, 0, 1));
  interval.inside = {interval.lower, interval.upper, (interval.lower + interval.upper) / 2, somewhere};
  return interval;
}

}  // namespace

Rational random_rational(Random& random, Spread spread) {
  switch (spread) {
    case Spread::uniform:
      return Rational(uniform(random, -1, 1));
    case Spread::log_uniform:
      return sign(random) * Rational(log_uniform(random, 1e-300, 1e300));
    case Spread::small_fractions:
      return sign(random) * fraction(random);
    case Spread::special:
      break;
  }
  return sign(random) * special(random);
}

Rational random_rational(Random& random) { return random_rational(random, static_cast<Spread>(random() % 4)); }

ExactInterval random_interval(Random& random) { return around(random, random_rational(random)); }

std::pair<ExactInterval, ExactInterval> random_pair(Random& random) {
  const Rational first = random_rational(random);
  Rational second = random_rational(random);
  if (random() % 4 == 0) second = sign(random) * first * (1 + sign(random) * power(Rational(1, 2), random() % 200));
  return {around(random, first), around(random, second)};
}

}  // namespace heraldgauge::test
