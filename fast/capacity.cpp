// Capacities of loss alone (Pirandola, Laurenza, Ottaviani and Banchi 2017; the loose one after Takeoka, Guha and Wilde
// 2014, attributions from memory).

#include "fast/capacity.hpp"

#include <algorithm>
#include <cmath>

#include "fast/numbers.hpp"
#include "fast/precision.hpp"
#include "fast/quantities.hpp"

namespace heraldgauge::fast {
namespace {

using model::QuantityKind;

constexpr double ln2 = 0.693147180559945309417;
constexpr double bound = 0x1p-49;  // products in double-double, then a complement, one logarithm and a division

}  // namespace

void Transmittance::pass(const DoubleDouble& t) {
  constexpr double small = 0x1p-400;
  value = value * t;
  if (value.hi >= small || value.hi == 0) return;
  value = {value.hi / small, value.lo / small};
  exponent -= 400;
}

DoubleDouble Transmittance::plain() const {
  const int shift = static_cast<int>(std::max(exponent, -1000L));
  return {std::ldexp(value.hi, shift), std::ldexp(value.lo, shift)};
}

bool Transmittance::below(const Transmittance& other) const {
  if (value.hi == 0 || other.value.hi == 0) return value.hi < other.value.hi;
  return exponent != other.exponent ? exponent < other.exponent : value < other.value;
}

bool is_capacity(QuantityKind kind) {
  using enum QuantityKind;
  return kind == capacity_point || kind == capacity_loose || kind == capacity_chain || kind == capacity_arm;
}

Bottlenecks bottlenecks_of(const model::Chain& chain) {
  Bottlenecks result;
  const model::Real* last = nullptr;  // arms are alike in most chains
  DoubleDouble t;
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    Transmittance source;
    for (const model::Arm* arm : {&chain.left_arms[k], &chain.right_arms[k]}) {
      if (last == nullptr || !(*last == arm->transmittance)) t = rounded(arm->transmittance);
      last = &arm->transmittance;
      Transmittance single;
      single.pass(t);
      source.pass(t);
      result.chain.pass(t);
      if (single.below(result.arm)) result.arm = single;
    }
    if (source.below(result.source)) result.source = source;
  }
  return result;
}

Value capacity(const Bottlenecks& bottlenecks, const model::Quantity& quantity) {
  const bool loose = quantity.kind == QuantityKind::capacity_loose;
  const Transmittance& eta = quantity.kind == QuantityKind::capacity_chain ? bottlenecks.source
                             : quantity.kind == QuantityKind::capacity_arm ? bottlenecks.arm
                                                                           : bottlenecks.chain;
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
