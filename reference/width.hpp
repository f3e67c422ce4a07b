#pragma once
// Asked widths: when an interval is narrow enough, and how many bits are missing where it is not.

#include <optional>

#include "reference/arithmetic/interval.hpp"
#include "reference/enclose.hpp"

namespace heraldgauge::reference {

// Whether upper - lower <= 10^-(digits+1) max(|x|, scale) for every x inside: one digit more than asked, so that
// outward rounding to digits + 2 decimals still meets 10^-digits. An exact number is always narrow enough.
bool is_narrow_enough(const Interval& x, const std::optional<Interval>& scale, int digits);

// log2 of the factor by which the width is too large (> 0 where it is); nothing where x contains zero and no scale
// helps.
std::optional<double> missing_bits(const Interval& x, const std::optional<Interval>& scale, int digits);

// floor(-log10 of width / max(|x|, scale)), from 0 to the asked digits; 99 for an exact number.
int certified_digits(const Interval& x, const std::optional<Interval>& scale, int asked);

inline constexpr int digits_of_exact = 99;
inline constexpr double bits_per_digit = 3.3219280948873626;  // log2(10), rounded up

}  // namespace heraldgauge::reference
