#pragma once
// The one reader of numbers. It promises exactness: the rational that the text means, never a rounded one.

#include <string>
#include <string_view>

#include "reference/model/fault.hpp"
#include "reference/model/rational.hpp"

namespace heraldgauge::model {

// How a literal is meant (scenario key `inputs`): as typed, or as the binary64 number nearest to it (ties to even).
enum class InputMeaning { decimal, binary64 };

// Reads a decimal ("-1.25e-3", "+7", ".5", "5.") or a fraction of two integers or decimals ("3/7"). Digits may be
// separated by single underscores between digits, as in TOML. At most 10 000 digits and |exponent| <= 10 000, checked
// before any big number is built. Refuses nan, inf, hexadecimal, octal, binary, a decimal comma (with a hint), blanks,
// a zero denominator and anything left over. The faults carry no location; the caller knows it.
Expected<Rational> parse_exact(std::string_view text);

// The binary64 number nearest to x, ties to even, as an exact rational; a fault where it would overflow. Subnormals are
// binary64 numbers; what rounds to zero is zero.
Expected<Rational> nearest_binary64(const Rational& x);

// x as text: a terminating decimal where it has one, else "p/q". Parsing gives x back. Scientific form ("2.5e-7") where
// the plain one would need more than five zeros before the first digit or more than 21 digits before the point.
std::string exact_text(const Rational& x);

}  // namespace heraldgauge::model
