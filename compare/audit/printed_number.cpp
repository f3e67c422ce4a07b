#include "compare/audit/printed_number.hpp"

#include <algorithm>
#include <array>
#include <charconv>

namespace heraldgauge::compare {
namespace {

using model::Rational;

bool is_digit(char c) { return c >= '0' && c <= '9'; }

// 10^exponent / 2.
Rational half_of_power(long exponent) {
  Rational half;
  mpz_ui_pow_ui(half.get_num_mpz_t(), 10, static_cast<unsigned long>(std::max(exponent, 0L)));
  mpz_ui_pow_ui(half.get_den_mpz_t(), 10, static_cast<unsigned long>(std::max(-exponent, 0L)));
  half.get_den() *= 2;
  half.canonicalize();
  return half;
}

// Requires a decimal that parse_exact accepts.
void measure_decimal(std::string_view text, PrintedNumber& number) {
  long after_point = 0;
  bool point = false, leading = true;
  std::size_t i = 0;
  for (; i < text.size() && text[i] != 'e' && text[i] != 'E'; ++i) {
    if (text[i] == '.') point = true;
    if (!is_digit(text[i])) continue;
    if (point) ++after_point;
    leading = leading && text[i] == '0';
    if (!leading) ++number.significant_digits;
  }
  long exponent = 0;
  ++i;
  if (i < text.size() && text[i] == '+') ++i;
  if (i < text.size()) std::from_chars(text.data() + i, text.data() + text.size(), exponent);
  number.half_unit = half_of_power(exponent - after_point);
}

std::string lower_case(std::string_view text) {
  std::string lower(text);
  std::transform(lower.begin(), lower.end(), lower.begin(),
                 [](char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; });
  return lower;
}

}  // namespace

model::Expected<PrintedNumber> read_printed(std::string_view text) {
  model::Expected<Rational> value = model::parse_exact(text);
  if (!value) return value.faults();
  PrintedNumber number{std::move(value.value()), 0, 0};
  if (text.find('/') == std::string_view::npos) {
    std::string plain(text);
    std::erase(plain, '_');
    measure_decimal(plain, number);
  } else {
    number.significant_digits = static_cast<long>(text.size());
  }
  return number;
}

bool is_not_a_number(std::string_view text) {
  std::string lower = lower_case(text);
  if (!lower.empty() && (lower.front() == '-' || lower.front() == '+')) lower.erase(0, 1);
  constexpr std::array<std::string_view, 7> spellings = {"nan",    "inf",    "infinity", "1.#qnan",
                                                         "1.#ind", "1.#inf", "nan(ind)"};
  return std::find(spellings.begin(), spellings.end(), lower) != spellings.end();
}

bool has_decimal_comma(std::string_view text) {
  const std::size_t comma = text.find(',');
  if (comma == std::string_view::npos) return false;
  std::string with_point(text);
  with_point[comma] = '.';
  return static_cast<bool>(model::parse_exact(with_point));
}

std::string_view trimmed(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t");
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

}  // namespace heraldgauge::compare
