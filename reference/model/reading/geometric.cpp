#include "reference/model/reading/geometric.hpp"

#include <mpfr.h>

#include <numeric>

#include "reference/model/exact_number.hpp"

namespace heraldgauge::model::reading {
namespace {

// Owner of an mpfr_t. All operations round to nearest; the error bounds are stated where they are used.
class Float {
 public:
  explicit Float(mpfr_prec_t bits) { mpfr_init2(data_, bits); }
  Float(const Float&) = delete;
  Float& operator=(const Float&) = delete;
  ~Float() { mpfr_clear(data_); }
  mpfr_ptr get() { return data_; }

 private:
  mpfr_t data_;
};

void set_logarithm(Float& result, const Rational& x) {
  mpfr_set_q(result.get(), x.get_mpq_t(), MPFR_RNDN);
  mpfr_log(result.get(), result.get(), MPFR_RNDN);
}

// The common double of x (1 - 2^-bits) and x (1 + 2^-bits), if they have one.
std::optional<Rational> nearest_where_certain(Float& x, mpfr_prec_t bits) {
  Rational centre;
  mpfr_get_q(centre.get_mpq_t(), x.get());
  const Rational radius = centre / Rational(Integer(Integer(1) << static_cast<unsigned long>(bits)));
  const Expected<Rational> below = nearest_binary64(centre - radius);
  const Expected<Rational> above = nearest_binary64(centre + radius);
  if (!below || !above || *below != *above) return std::nullopt;
  return *below;
}

// The geometric point with relative error below 2^-bits: ln(point) = (back ln(from) + ahead ln(to)) / (back + ahead).
// Each logarithm is below 2^11 in magnitude, as from and to are binary64 in size, so the exponent's absolute error is
// below 4 * 2^11 * 2^-(bits+32) and the point's relative error below 2^-bits.
std::optional<Rational> rounded_point(const Rational& from, const Rational& to, std::uint64_t back, std::uint64_t ahead,
                                      mpfr_prec_t bits) {
  Float low(bits + 32), high(bits + 32);
  set_logarithm(low, from);
  set_logarithm(high, to);
  mpfr_mul_ui(low.get(), low.get(), back, MPFR_RNDN);
  mpfr_mul_ui(high.get(), high.get(), ahead, MPFR_RNDN);
  mpfr_add(low.get(), low.get(), high.get(), MPFR_RNDN);
  mpfr_div_ui(low.get(), low.get(), back + ahead, MPFR_RNDN);
  mpfr_exp(low.get(), low.get(), MPFR_RNDN);
  return nearest_where_certain(low, bits);
}

Rational power(const Rational& base, unsigned long exponent) {
  Rational result;
  mpz_pow_ui(result.get_num_mpz_t(), base.get_num_mpz_t(), exponent);
  mpz_pow_ui(result.get_den_mpz_t(), base.get_den_mpz_t(), exponent);
  return result;
}

// The geometric point where it is rational: from * (to/from)^(j/p) in lowest terms is rational only if to/from is the
// p-th power of a rational.
std::optional<Rational> rational_point(const Rational& from, const Rational& to, std::uint64_t index,
                                       std::uint64_t steps) {
  const std::uint64_t common = std::gcd(index, steps);
  const Rational ratio = to / from;
  Rational root;
  const bool exact = mpz_root(root.get_num_mpz_t(), ratio.get_num_mpz_t(), steps / common) != 0 &&
                     mpz_root(root.get_den_mpz_t(), ratio.get_den_mpz_t(), steps / common) != 0;
  if (!exact) return std::nullopt;
  return from * power(root, index / common);
}

}  // namespace

Rational geometric_point(const Rational& from, const Rational& to, std::uint64_t index, std::uint64_t points) {
  const std::uint64_t steps = points - 1;
  if (index == 0) return *nearest_binary64(from);
  if (index == steps) return *nearest_binary64(to);
  constexpr mpfr_prec_t first_bits = 96;
  if (auto point = rounded_point(from, to, steps - index, index, first_bits)) return *point;
  // Only a point half way between two doubles is never certain, and that one is rational.
  if (auto point = rational_point(from, to, index, steps)) return *nearest_binary64(*point);
  for (mpfr_prec_t bits = 2 * first_bits;; bits *= 2) {
    if (auto point = rounded_point(from, to, steps - index, index, bits)) return *point;
  }
}

std::optional<bool> exponential_is_below_one(const Rational& scale, const Rational& x) {
  if (scale == 0) return true;
  if (x == 0) return scale < 1;
  // ln(scale) + x is never 0 for a rational scale and a rational x != 0 (Lindemann), so enough bits decide its sign.
  constexpr mpfr_prec_t most_bits = 4096;
  for (mpfr_prec_t bits = 128; bits <= most_bits; bits *= 2) {
    Float low(bits), high(bits);
    mpfr_set_q(low.get(), scale.get_mpq_t(), MPFR_RNDD);
    mpfr_log(low.get(), low.get(), MPFR_RNDD);
    mpfr_add_q(low.get(), low.get(), x.get_mpq_t(), MPFR_RNDD);
    mpfr_set_q(high.get(), scale.get_mpq_t(), MPFR_RNDU);
    mpfr_log(high.get(), high.get(), MPFR_RNDU);
    mpfr_add_q(high.get(), high.get(), x.get_mpq_t(), MPFR_RNDU);
    if (mpfr_sgn(high.get()) < 0) return true;
    if (mpfr_sgn(low.get()) > 0) return false;
  }
  return std::nullopt;
}

}  // namespace heraldgauge::model::reading
