#include "reference/quantities.hpp"

#include "reference/arithmetic/binary_entropy.hpp"

namespace heraldgauge::reference {

Interval secret_share(const model::Protocol& protocol, const Interval& qber_rectilinear,
                      const Interval& qber_diagonal) {
  const Precision bits = qber_rectilinear.precision();
  const Interval corrected = Interval(protocol.error_correction_factor, bits) * binary_entropy(qber_rectilinear);
  const Interval share = Interval(1L, bits) - corrected - binary_entropy(qber_diagonal);
  return larger_of(share, Interval(0L, bits));
}

}  // namespace heraldgauge::reference
