// Elements of the second quantisation of a 2x2 matrix against their defining sum, written out with factorials.
#include <gtest/gtest.h>

#include "reference/pair_number/gamma_elements.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Rational;

constexpr Precision bits = 200;

Rational binomial(long n, long k) {
  if (k < 0 || k > n) return 0;
  model::Integer value;
  mpz_bin_uiui(value.get_mpz_t(), static_cast<unsigned long>(n), static_cast<unsigned long>(k));
  return value;
}

Rational to_the(const Rational& x, long n) {
  Rational result = 1;
  for (long i = 0; i < n; ++i) result *= x;
  return result;
}

// The coefficient of u^i' w^j' in (a u + x w)^i (x u + b w)^j: choose p of the i factors and i'-p of the j factors to
// give u.
Rational defining_sum(const Rational& a, const Rational& b, const Rational& x, long sector, long alpha, long beta) {
  const long i = alpha + sector;
  Rational sum = 0;
  for (long p = 0; p <= alpha; ++p) {
    const Rational ways = binomial(i, p) * binomial(beta, alpha - p);
    if (ways != 0) sum += ways * to_the(a, p) * to_the(x, i - p + alpha - p) * to_the(b, beta - alpha + p);
  }
  return sum;
}

Polynomial constant(const Rational& value) { return {{{0, 0}, 0, Interval(value, bits)}}; }

TEST(GammaElements, EqualTheirDefiningSum) {
  const CountAlgebra algebra({}, 0, bits);
  for (const Rational& x : {Rational(0), Rational(2, 7), Rational(-2, 7)}) {
    const Rational a(3, 5), b(4, 9);
    long count = 0;
    for_each_gamma_element(algebra, {constant(a), constant(b), constant(x), constant(x)}, {6, 5, 9, 4},
                           [&](long sector, long alpha, long beta, const Interval* element) {
                             const Rational expected = defining_sum(a, b, x, sector, alpha, beta);
                             EXPECT_TRUE(element->contains(expected)) << sector << " " << alpha << " " << beta;
                             EXPECT_LE(element->log2_width(), element->log2_mignitude() - 190);
                             ++count;
                           });
    EXPECT_EQ(count, 39 + 29 + 20 + 12 + 6);
  }
}

TEST(GammaElements, VisitsOnlyTheSectorsAskedFor) {
  const CountAlgebra algebra({}, 0, bits);
  const Polynomial half = constant(Rational(1, 2));
  for_each_gamma_element(algebra, {half, half, half, half}, {4, 4, 8, 0},
                         [&](long sector, long alpha, long beta, const Interval* element) {
                           EXPECT_EQ(sector, 0);
                           EXPECT_TRUE(element->contains(defining_sum({1, 2}, {1, 2}, {1, 2}, 0, alpha, beta)));
                         });
}

// Reading "at least one" and "exactly r" off the algebra against differences and coefficients of plain elements.
TEST(GammaElements, CountPhotons) {
  const Rational a0(1, 3), az(1, 4), b0(2, 5), bz(1, 5), x0(1, 10), xz(-1, 6);
  const auto polynomial = [](const Rational& base, const Rational& counted) {
    return Polynomial{{{0, 0}, 0, Interval(base, bits)}, {{1, 0}, 0, Interval(counted, bits)}};
  };
  const ModePair modes{polynomial(a0, az), polynomial(b0, bz), polynomial(x0, xz), polynomial(x0, xz)};
  const auto at = [&](const Rational& z, long sector, long alpha, long beta) {
    return defining_sum(a0 + z * az, b0 + z * bz, x0 + z * xz, sector, alpha, beta);
  };
  const CountAlgebra clicks({{{CountVariable::Rule::idempotent, 1}, {}}}, 0, bits);
  for_each_gamma_element(clicks, modes, {4, 4, 8, 3}, [&](long sector, long alpha, long beta, const Interval* element) {
    EXPECT_TRUE(element[0].contains(at(0, sector, alpha, beta)));
    EXPECT_TRUE(element[1].contains(at(1, sector, alpha, beta) - at(0, sector, alpha, beta)));
  });
  const CountAlgebra counts({{{CountVariable::Rule::truncated, 2}, {}}}, 0, bits);
  for_each_gamma_element(counts, modes, {1, 1, 2, 1}, [&](long sector, long alpha, long beta, const Interval* element) {
    // At most two photons: the polynomial is element[0] + element[1] z + element[2] z^2.
    for (int z : {-1, 1, 3}) {
      const Interval sum = element[0] + element[1] * z + element[2] * (z * z);
      EXPECT_TRUE(sum.contains(at(z, sector, alpha, beta))) << sector << alpha << beta;
    }
  });
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
