// Capacities of loss alone (Pirandola, Laurenza, Ottaviani and Banchi 2017; the loose one after Takeoka, Guha and Wilde
// 2014, attributions from memory).

#include <algorithm>
#include <cmath>

#include "fast/numbers.hpp"
#include "fast/quantities.hpp"

namespace heraldgauge::fast {
namespace {

using model::QuantityKind;

constexpr double ln2 = 0.693147180559945309417;
constexpr double bound = 0x1p-49;  // products in double-double, then a complement, one logarithm and a division

// A transmittance too small for binary64 in the end: value * 2^exponent.
struct Transmittance {
  DoubleDouble value = 1;
  long exponent = 0;

  void pass(const DoubleDouble& t) {
    value = value * t;
    const int shift = binary_exponent(value.hi);
    value = {std::ldexp(value.hi, -shift), std::ldexp(value.lo, -shift)};
    exponent += shift;
  }
  DoubleDouble plain() const {
    const int shift = static_cast<int>(std::max(exponent, -1000L));
    return {std::ldexp(value.hi, shift), std::ldexp(value.lo, shift)};
  }
  bool below(const Transmittance& other) const {
    if (value.hi == 0 || other.value.hi == 0) return value.hi < other.value.hi;
    return exponent != other.exponent ? exponent < other.exponent : value < other.value;
  }
};

// Whole chain, worst source or worst arm.
Transmittance bottleneck(const model::Chain& chain, QuantityKind kind) {
  Transmittance all;
  Transmittance worst;
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    Transmittance source;
    for (const model::Arm* arm : {&chain.left_arms[k], &chain.right_arms[k]}) {
      const DoubleDouble t = rounded(arm->transmittance);
      all.pass(t);
      source.pass(t);
      Transmittance single;
      single.pass(t);
      if (kind == QuantityKind::capacity_arm && single.below(worst)) worst = single;
    }
    if (kind == QuantityKind::capacity_chain && source.below(worst)) worst = source;
  }
  return kind == QuantityKind::capacity_point || kind == QuantityKind::capacity_loose ? all : worst;
}

}  // namespace

bool is_capacity(QuantityKind kind) {
  using enum QuantityKind;
  return kind == capacity_point || kind == capacity_loose || kind == capacity_chain || kind == capacity_arm;
}

Value capacity(const model::Chain& chain, const model::Quantity& quantity) {
  const Transmittance eta = bottleneck(chain, quantity.kind);
  const bool loose = quantity.kind == QuantityKind::capacity_loose;
  if (eta.value.hi == 0) return {quantity, Status::computed, "", {}, 0};
  if (eta.exponent < -200) {  // -ln(1 - eta) = eta and ln((1+eta)/(1-eta)) = 2 eta to the last place
    return {quantity, Status::computed, "", scaled((loose ? 2 : 1) * eta.value.hi / ln2, eta.exponent), bound};
  }
  const DoubleDouble t = eta.plain();
  const DoubleDouble lost = DoubleDouble(1) - t;
  if (lost.hi <= 0) return {quantity, Status::undefined, "the capacity is infinite: nothing is lost", {}, 0};
  const double loss_log = t.hi < 0.5 ? -std::log1p(-t.hi) : -std::log(lost.hi);
  const double value = (loose ? loss_log + std::log1p(t.hi) : loss_log) / ln2;
  return {quantity, Status::computed, "", scaled(value, 0), bound};
}

}  // namespace heraldgauge::fast
