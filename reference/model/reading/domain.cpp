#include <fmt/format.h>

#include "reference/model/reading/keys.hpp"

namespace heraldgauge::model::reading {
namespace {

using enum Domain::Kind;

std::string quoted_words(const std::vector<std::string_view>& words) {
  std::string list;
  for (std::size_t index = 0; index < words.size(); ++index) {
    if (index > 0) list += index + 1 == words.size() ? " or " : ", ";
    list += fmt::format("\"{}\"", words[index]);
  }
  return list;
}

std::string range(const Domain& domain) {
  const std::string noun = domain.kind == integer ? "an integer" : "a number";
  const std::string unit = domain.unit.empty() ? "" : fmt::format(" ({})", domain.unit);
  if (!domain.lower) return noun + unit;
  const std::string lower = exact_text(*domain.lower);
  const std::string from = domain.lower_open ? fmt::format("above {}", lower) : fmt::format("from {}", lower);
  if (!domain.upper) return fmt::format("{} of at least {}{}", noun, lower, unit);
  const std::string upper = exact_text(*domain.upper);
  const std::string to = domain.upper_open ? fmt::format("to below {}", upper) : fmt::format("to {}", upper);
  return fmt::format("{} {} {}{}", noun, from, to, unit);
}

bool holds(const Domain& domain, const Rational& x) {
  if (domain.lower && (x < *domain.lower || (domain.lower_open && x == *domain.lower))) return false;
  return !domain.upper || x < *domain.upper || (!domain.upper_open && x == *domain.upper);
}

std::string shortened(std::string text) {
  constexpr std::size_t longest = 40;
  if (text.size() > longest) text = text.substr(0, longest) + "...";
  return text;
}

bool holds_word(const Domain& domain, const std::string& text) {
  return std::find(domain.words.begin(), domain.words.end(), text) != domain.words.end();
}

std::optional<std::string> wrong_text(const Domain& domain, const std::string& text) {
  if (domain.kind == Domain::Kind::text) return std::nullopt;
  if (domain.kind != word && domain.kind != heralds) return std::string("is a text");
  if (holds_word(domain, text)) return std::nullopt;
  return fmt::format("is \"{}\"", shortened(text));
}

std::optional<std::string> wrong_texts(const Domain& domain, const std::vector<std::string>& texts) {
  if (domain.kind != heralds) return std::string("is an array");
  for (const std::string& text : texts) {
    if (auto wrong = wrong_text(domain, text)) return wrong;
  }
  return std::nullopt;
}

}  // namespace

std::string allowed_values(const Domain& domain) {
  switch (domain.kind) {
    case text:
      return "a text";
    case word:
      return quoted_words(domain.words);
    case heralds:
      return quoted_words(domain.words) + ", or an array of them";
    case names:
      return "an array of names of quantities";
    case pattern:
      return "{ stations = [\"1100\", ...], left = \"10\", right = \"01\" }, or an array of texts, one a detector; 1 "
             "clicks, 0 silent, * not looked at, n2 counts two";
    case number:
    case integer:
      break;
  }
  return range(domain);
}

std::optional<std::string> wrong_value(const Domain& domain, const Value& value) {
  if (const auto* text = std::get_if<std::string>(&value)) return wrong_text(domain, *text);
  if (const auto* texts = std::get_if<std::vector<std::string>>(&value)) return wrong_texts(domain, *texts);
  const Rational& x = std::get<Rational>(value);
  if (domain.kind != number && domain.kind != integer) return std::string("is a number");
  if (domain.kind == integer && x.get_den() != 1) return fmt::format("is {}, no integer", shortened(exact_text(x)));
  if (!holds(domain, x)) return fmt::format("is {}", shortened(exact_text(x)));
  return std::nullopt;
}

}  // namespace heraldgauge::model::reading
