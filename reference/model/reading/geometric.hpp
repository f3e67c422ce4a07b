#pragma once
// The two places where the reader meets logarithms and exponentials. Both decide exactly: precision is raised until the
// answer is certain.

#include <cstdint>
#include <optional>

#include "reference/model/rational.hpp"

namespace heraldgauge::model::reading {

// The binary64 number nearest to from^(1-s) to^s, s = index/(points-1): the exact geometric point, ties to even.
// Requires from, to > 0 within the range of binary64 and index < points, points >= 2.
Rational geometric_point(const Rational& from, const Rational& to, std::uint64_t index, std::uint64_t points);

// Whether scale * exp(x) < 1, for scale >= 0; nullopt where 4096 bits do not tell.
std::optional<bool> exponential_is_below_one(const Rational& scale, const Rational& x);

}  // namespace heraldgauge::model::reading
