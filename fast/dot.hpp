#pragma once
// Sums of products in four interleaved parts, so that an addition need not wait for the one before it.

#include <array>

namespace heraldgauge::fast {

// sum of term(0) .. term(count - 1), at most count / 4 + 4 additions on the way of any term.
template <class T, class Term>
T interleaved_sum(int count, const Term& term) {
  std::array<T, 4> part{T(0.0), T(0.0), T(0.0), T(0.0)};
  int k = 0;
  for (; k + 4 <= count; k += 4) {
    for (int i = 0; i < 4; ++i) part[static_cast<std::size_t>(i)] += term(k + i);
  }
  for (; k < count; ++k) part[0] += term(k);
  return (part[0] + part[1]) + (part[2] + part[3]);
}

}  // namespace heraldgauge::fast
