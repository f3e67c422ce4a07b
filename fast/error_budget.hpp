#pragma once
// The one place where round-off is counted: relative errors of non-negative sums of products, in units of
// Precision<T>::unit (one operation, one rounded input). Errors of factors add; a sum of n terms adds n - 1 to the
// worst term.

namespace heraldgauge::fast {

// Bounds are computed in binary64 themselves, from sums of at most 1e5 positive terms: below 1e-10 relative.
inline constexpr double bound_slack = 1 + 1e-10;

// (1 + u)^n - 1 <= n u / (1 - n u), and products of first-order errors: n u stays below 1e-3 here.
inline constexpr double second_order = 1.001;

// Weight vacuum * lam^n (two a step), the scale exact.
inline constexpr double source_count(int cutoff) { return 2.0 * cutoff + 3; }

// E = sum_p W U U': W from two tables (silent 2 a photon and 2, click 4 a photon and 3, half of a double click 2), each
// U 2 and their product 1, the sum n, the factor into the unnormalised basis and its product 4.
inline constexpr double end_count(int cutoff) { return 4.0 * cutoff + 8 + 5 + cutoff + 2 + 4; }

// Two elements: four a photon (coefficient, product, two sums; the photons of H and V together are at most the two
// cut-offs), five for the dark event and the silent detector, one for c + d. Two sums over the photons that come in,
// two more terms to add, the products, and the weight of the next source.
template <class R>
R station_count(int in, int out, const R& loss) {
  return R(4.0 * (in + out) + 14) * loss + R(in + 2.0 + 4 + 2 + source_count(out) + 1);
}

// Rows, columns and sectors of the last contraction, and sums of up to eight of them.
inline constexpr double contraction_count(int cutoff) { return 3.0 * cutoff + 12; }

}  // namespace heraldgauge::fast
