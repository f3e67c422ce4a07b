#pragma once
// Comparing an enclosure with a printed number.

#include <string>

#include "reference/arithmetic/interval.hpp"
#include "tests/support/published.hpp"

namespace heraldgauge::test {

// Enclosures in these tests are far narrower than the 40 digits of the published values.
inline constexpr reference::Precision published_bits = 400;

// The parameter or value of that name as an interval at published_bits; throws where it is missing.
reference::Interval interval_of(const Texts& texts, const std::string& name);
model::Rational rational_of(const Texts& texts, const std::string& name);
bool has(const Texts& texts, const std::string& name);

// Records a failure unless the enclosure is narrower than a millionth of the last printed digit and lies within half a
// unit of the last printed digit. The published values are rounded to nearest.
void expect_published(const reference::Interval& ours, const Texts& values, const std::string& name);
// True where x, rounded to nearest at the printed decimal's last digit, is the printed decimal.
bool rounds_to(const reference::Interval& x, const std::string& printed);
// True where cutting x off at that digit gives it.
bool truncates_to(const reference::Interval& x, const std::string& printed);

}  // namespace heraldgauge::test
