#pragma once
// Capacities of loss alone, from the transmittances of the arms.

#include "fast/double_double.hpp"
#include "fast/evaluate.hpp"

namespace heraldgauge::fast {

// A transmittance that may be too small for binary64 in the end: value * 2^exponent, value in [2^-400, 1] or 0.
struct Transmittance {
  DoubleDouble value = 1;
  long exponent = 0;

  void pass(const DoubleDouble& t);
  DoubleDouble plain() const;
  bool below(const Transmittance& other) const;
};

// Of all arms together, of the worst source (its two arms together), and of the worst arm.
struct Bottlenecks {
  Transmittance chain, source, arm;
};
Bottlenecks bottlenecks_of(const model::Chain& chain);

// A capacity in bits per mode; undefined where nothing is lost.
Value capacity(const Bottlenecks& bottlenecks, const model::Quantity& quantity);
bool is_capacity(model::QuantityKind kind);

}  // namespace heraldgauge::fast
