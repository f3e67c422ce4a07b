#pragma once
// A number as somebody printed it: what it says exactly, and how much its last digit leaves open.

#include <optional>
#include <string>
#include <string_view>

#include "reference/model/exact_number.hpp"

namespace heraldgauge::compare {

struct PrintedNumber {
  model::Rational value;
  model::Rational half_unit;    // half a unit of the last printed digit; 0 for a fraction
  long significant_digits = 0;  // as printed, trailing zeros included; 0 for "0" and "0.00"
};

// Faults as model::parse_exact.
model::Expected<PrintedNumber> read_printed(std::string_view text);

// Whether a text is one of the usual spellings of not-a-number or infinity.
bool is_not_a_number(std::string_view text);

// Whether a text is a number but for a comma in place of the decimal point.
bool has_decimal_comma(std::string_view text);

// The text without blanks and tabs round it.
std::string_view trimmed(std::string_view text);

}  // namespace heraldgauge::compare
