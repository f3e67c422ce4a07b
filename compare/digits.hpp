#pragma once
// How many digits of a number are right, judged by an enclosure of the exact value.

#include "reference/enclose.hpp"

namespace heraldgauge::compare {

inline constexpr int most_digits = 99;

// floor(-log10 |relative error|), at least 0 and at most 99, of the largest error that the enclosure allows: (x - e)/e
// over all e in it. 99 where the value is exact; 0 where the enclosure holds zero and more.
int agreeing_digits(const model::Rational& value, const reference::Enclosure& exact);

}  // namespace heraldgauge::compare
