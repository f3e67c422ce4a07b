#pragma once
// The quantities that are rational functions of the joint tables, in either arithmetic, and the key figures in
// intervals.

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference {

// Joint probability of the herald and at least one click at each end.
template <class Number>
Number both_ends_click(const EndTable<Number>& table) {
  Number sum = table.joint[1][1];
  for (std::size_t l = 1; l < 4; ++l) {
    for (std::size_t r = 1; r < 4; ++r) {
      if (l != 1 || r != 1) add(sum, sum, table.joint[l][r]);
    }
  }
  return sum;
}

// The erroneous share of that: outcomes that are not as expected; where an end has two clicks its outcome is drawn
// evenly, so half of those.
template <class Number>
Number erroneous(const Field<Number>& field, const EndTable<Number>& table, bool agreement_expected) {
  constexpr std::size_t both = 3;
  Number sum = field(0L), drawn = field(0L);
  for (std::size_t l = 1; l < 4; ++l) {
    for (std::size_t r = 1; r < 4; ++r) {
      if (l == both || r == both) {
        add(drawn, drawn, table.joint[l][r]);
      } else if ((l == r) != agreement_expected) {
        add(sum, sum, table.joint[l][r]);
      }
    }
  }
  multiply(drawn, drawn, field(Rational(1, 2)));
  add(sum, sum, drawn);
  return sum;
}

// Sources emit phi+, and every station exchanges H and V: rectilinear outcomes agree after an even number of stations.
// Diagonal outcomes agree after the correction, whatever the number of psi- outcomes.
inline bool rectilinear_agreement_expected(const model::Chain& chain) { return chain.station_count() % 2 == 0; }
inline constexpr bool diagonal_agreement_expected = true;

// max(0, 1 - f h2(rectilinear error) - h2(diagonal error)), the secret share of the sifted bits (asymptotic, one-way).
Interval secret_share(const model::Protocol& protocol, const Interval& qber_rectilinear, const Interval& qber_diagonal);

}  // namespace heraldgauge::reference
