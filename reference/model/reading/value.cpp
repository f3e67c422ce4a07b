#include "reference/model/reading/value.hpp"

#include <fmt/format.h>

namespace heraldgauge::model::reading {
namespace {

constexpr std::size_t longest_bare_literal = 128;

bool is_numeric(const Domain& domain) {
  return domain.kind == Domain::Kind::number || domain.kind == Domain::Kind::integer;
}

Faults placed(Faults faults, const Location& location) {
  for (Fault& fault : faults) fault.location = location;
  return faults;
}

Expected<Value> read_texts(const Node& node, const Domain& domain, const Location& location) {
  std::vector<std::string> texts;
  for (const Node& item : node.items) {
    if (item.kind != Node::Kind::text) {
      return Fault{location, fmt::format("holds {}", description(item.kind)), allowed_values(domain)};
    }
    texts.push_back(item.text);
  }
  return Value(std::move(texts));
}

// The value before its range is checked.
Expected<Value> unchecked_value(const Domain& domain, const Node& node, InputMeaning inputs, const Location& location) {
  const bool text_or_number = node.kind == Node::Kind::text || node.kind == Node::Kind::number;
  if (is_numeric(domain) && text_or_number) {
    Expected<Rational> number = read_number(node, inputs, location);
    if (!number) return number.faults();
    return Value(std::move(*number));
  }
  if (domain.kind == Domain::Kind::heralds && node.kind == Node::Kind::array) return read_texts(node, domain, location);
  if (node.kind == Node::Kind::text) return Value(node.text);
  return Fault{location, fmt::format("is {}", description(node.kind)), allowed_values(domain)};
}

}  // namespace

Location place_of(const Node& node, const std::string& source, const std::string& key) {
  return {source, node.line, node.column, key};
}

Location place_of(const Member& member, const std::string& source, const std::string& key) {
  return {source, member.line, member.column, key};
}

Expected<Rational> read_number(const Node& node, InputMeaning inputs, const Location& location) {
  if (node.kind == Node::Kind::number && node.text.size() > longest_bare_literal) {
    return Fault{location, fmt::format("a bare number has {} characters", node.text.size()),
                 "at most 128 characters bare, 10000 digits in quotes"};
  }
  Expected<Rational> number = parse_exact(node.text);
  if (number && inputs == InputMeaning::binary64) number = nearest_binary64(*number);
  if (!number) return placed(number.faults(), location);
  return number;
}

Expected<Value> read_value(const Key& key, const Node& node, InputMeaning inputs, const Location& location) {
  Expected<Value> value = unchecked_value(*key.domain, node, inputs, location);
  if (!value) return value;
  if (auto wrong = wrong_value(*key.domain, *value)) return Fault{location, *wrong, allowed_values(*key.domain)};
  return value;
}

}  // namespace heraldgauge::model::reading
