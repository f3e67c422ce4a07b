#include "fast/double_double.hpp"

namespace heraldgauge::fast {
namespace {

constexpr DoubleDouble ln2{0x1.62e42fefa39efp-1, 0x1.abc9e3b39803fp-56};
constexpr int halvings = 9;       // the Taylor argument is below ln2 / 2^10
constexpr int taylor_terms = 10;  // (ln2 / 1024)^11 / 11! < 2^-140

// e^r - 1 for |r| <= ln2 / 2: Taylor at r / 2^9, then (1 + s)^2 - 1 = s (2 + s), which keeps relative accuracy.
DoubleDouble reduced_exponential_minus_one(const DoubleDouble& r) {
  const DoubleDouble x{std::ldexp(r.hi, -halvings), std::ldexp(r.lo, -halvings)};
  DoubleDouble sum = 1;
  for (int k = taylor_terms; k >= 2; --k) sum = DoubleDouble(1) + sum * x / DoubleDouble(k);
  DoubleDouble s = sum * x;
  for (int i = 0; i < halvings; ++i) s = s * (DoubleDouble(2) + s);
  return s;
}

}  // namespace

DoubleDouble square_root(const DoubleDouble& x) {
  if (x.hi <= 0) return 0;
  const DoubleDouble first = std::sqrt(x.hi);
  const DoubleDouble better = first + (x - first * first) / (DoubleDouble(2) * first);
  return better + (x - better * better) / (DoubleDouble(2) * better);
}

DoubleDouble exponential(const DoubleDouble& x) {
  const double k = std::nearbyint(x.hi / ln2.hi);
  const DoubleDouble e = DoubleDouble(1) + reduced_exponential_minus_one(x - ln2 * DoubleDouble(k));
  return {std::ldexp(e.hi, static_cast<int>(k)), std::ldexp(e.lo, static_cast<int>(k))};
}

DoubleDouble exponential_minus_one(const DoubleDouble& x) {
  if (std::fabs(x.hi) <= ln2.hi / 2) return reduced_exponential_minus_one(x);
  return exponential(x) - DoubleDouble(1);
}

}  // namespace heraldgauge::fast
