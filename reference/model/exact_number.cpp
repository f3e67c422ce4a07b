#include "reference/model/exact_number.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <optional>

namespace heraldgauge::model {
namespace {

constexpr std::size_t most_digits = 10000;
constexpr long largest_exponent = 10000;
constexpr std::string_view allowed_number =
    "a decimal such as 0.25 or 1e-6, or in quotes a fraction such as \"3/7\", of at most 10000 digits and exponents up "
    "to 10000";

bool is_digit(char c) { return c >= '0' && c <= '9'; }

std::string shown(std::string_view text) {
  constexpr std::size_t longest = 40;
  if (text.size() <= longest) return fmt::format("'{}'", text);
  return fmt::format("'{}...' ({} characters)", text.substr(0, longest), text.size());
}

Fault refused(std::string_view text, std::string_view why) {
  return Fault{{}, fmt::format("{} {}", shown(text), why), std::string(allowed_number)};
}

// Why a text that is not a decimal is refused, as a clause.
std::string_view diagnosis(std::string_view text) {
  std::string lower(text.substr(0, 8));
  std::transform(lower.begin(), lower.end(), lower.begin(),
                 [](char c) { return c >= 'A' && c <= 'Z' ? char(c + 32) : c; });
  std::string_view body = lower;
  if (!body.empty() && (body[0] == '+' || body[0] == '-')) body.remove_prefix(1);
  if (text.empty()) return "is empty";
  if (body.starts_with("nan")) return "is not a number";
  if (body.starts_with("inf")) return "is not finite";
  if (body.starts_with("0x")) return "is hexadecimal";
  if (body.starts_with("0o")) return "is octal";
  if (body.starts_with("0b")) return "is binary";
  if (text.find(',') != std::string_view::npos) return "has a comma: the decimal separator is a point";
  if (text.find_first_of(" \t\r\n") != std::string_view::npos) return "holds a blank";
  return "is not a decimal number";
}

// Reads digits with single underscores between them from the front of `rest`; nullopt where an underscore stands
// elsewhere.
std::optional<std::string> take_digits(std::string_view& rest) {
  std::string digits;
  bool after_underscore = false;
  while (!rest.empty() && (is_digit(rest.front()) || rest.front() == '_')) {
    const bool underscore = rest.front() == '_';
    if (underscore && (digits.empty() || after_underscore)) return std::nullopt;
    if (!underscore) digits += rest.front();
    after_underscore = underscore;
    rest.remove_prefix(1);
  }
  if (after_underscore) return std::nullopt;
  return digits;
}

bool take(std::string_view& rest, std::string_view any_of) {
  if (rest.empty() || any_of.find(rest.front()) == std::string_view::npos) return false;
  rest.remove_prefix(1);
  return true;
}

bool take_sign(std::string_view& rest) {
  const bool negative = !rest.empty() && rest.front() == '-';
  take(rest, "+-");
  return negative;
}

// [digits] * 10^exponent.
struct Decimal {
  bool negative = false;
  std::string digits;
  long exponent = 0;
};

// The exponent after "e", or nullopt where it is malformed. Anything beyond the cap is reported as the cap plus one.
std::optional<long> take_exponent(std::string_view& rest) {
  const bool negative = take_sign(rest);
  const std::optional<std::string> digits = take_digits(rest);
  if (!digits || digits->empty()) return std::nullopt;
  long exponent = 0;
  for (const char digit : *digits) exponent = std::min(largest_exponent + 1, exponent * 10 + (digit - '0'));
  return negative ? -exponent : exponent;
}

Expected<Decimal> split_decimal(std::string_view text) {
  std::string_view rest = text;
  Decimal decimal;
  decimal.negative = take_sign(rest);
  const auto whole = take_digits(rest);
  const auto fraction = whole && take(rest, ".") ? take_digits(rest) : std::optional<std::string>("");
  if (!whole || !fraction || whole->size() + fraction->size() == 0) return refused(text, diagnosis(text));
  if (take(rest, "eE")) {
    const auto exponent = take_exponent(rest);
    if (!exponent) return refused(text, "has no digits in its exponent");
    if (std::abs(*exponent) > largest_exponent) return refused(text, "has an exponent beyond 10000");
    decimal.exponent = *exponent;
  }
  if (!rest.empty()) return refused(text, diagnosis(text));
  decimal.digits = *whole + *fraction;
  if (decimal.digits.size() > most_digits) return refused(text, "has more than 10000 digits");
  decimal.exponent -= static_cast<long>(fraction->size());
  return decimal;
}

Rational value_of(const Decimal& decimal) {
  Integer digits(decimal.digits, 10);
  if (decimal.negative) digits = -digits;
  if (digits == 0) return Rational(0);
  Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(std::abs(decimal.exponent)));
  if (decimal.exponent >= 0) return Rational(Integer(digits * power));
  Rational value(digits, power);
  value.canonicalize();
  return value;
}

}  // namespace

Expected<Rational> parse_exact(std::string_view text) {
  constexpr std::size_t longest_text = 4 * most_digits + 100;  // two parts, an underscore between any two digits
  if (text.size() > longest_text) return refused(text, "is too long");
  const std::size_t slash = text.find('/');
  const Expected<Decimal> numerator = split_decimal(text.substr(0, slash));
  if (!numerator)
    return slash == std::string_view::npos ? numerator.faults() : Faults{refused(text, "is not a fraction")};
  if (slash == std::string_view::npos) return value_of(*numerator);
  const Expected<Decimal> denominator = split_decimal(text.substr(slash + 1));
  if (!denominator) return refused(text, "is not a fraction");
  if (numerator->digits.size() + denominator->digits.size() > most_digits)
    return refused(text, "has more than 10000 digits");
  const Rational divisor = value_of(*denominator);
  if (divisor == 0) return refused(text, "has a denominator of zero");
  return Rational(value_of(*numerator) / divisor);
}

}  // namespace heraldgauge::model
