#pragma once
// Certified values in one call, for tests.

#include <string>

#include "reference/enclose.hpp"

namespace heraldgauge::test {

// The result for a quantity by name. Records a test failure and returns an empty result where the request is refused.
reference::Result certified(const model::Chain& chain, const std::string& quantity, int digits = 30);
reference::Result certified(const model::Chain& chain, const model::Pattern& pattern, int digits = 30);
// The same, which must be certified: its enclosure. Records a failure, with the reason, where it is not.
reference::Enclosure enclosure(const model::Chain& chain, const std::string& quantity, int digits = 30);
reference::Enclosure enclosure(const model::Chain& chain, const model::Pattern& pattern, int digits = 30);
// Exact rationals, or a failure.
model::Rational exactly(const model::Chain& chain, const std::string& quantity);
model::Rational exactly(const model::Chain& chain, const model::Pattern& pattern);

// The asked width: upper - lower <= 10^-digits max(|x|, scale).
bool has_width(const reference::Enclosure& x, int digits, const model::Rational& scale = 0);
bool overlap(const reference::Enclosure& a, const reference::Enclosure& b);
bool contains(const reference::Enclosure& x, const model::Rational& value);
reference::Enclosure sum(const reference::Enclosure& a, const reference::Enclosure& b);
// Both non-negative, the divisor positive.
reference::Enclosure quotient(const reference::Enclosure& a, const reference::Enclosure& b);
std::string shown(const reference::Enclosure& x);

// A pattern from characters in the order of the detectors: "1" clicks, "0" silent, "*" not looked at.
model::Pattern pattern(const std::vector<std::string>& stations, const std::string& left, const std::string& right);

}  // namespace heraldgauge::test
