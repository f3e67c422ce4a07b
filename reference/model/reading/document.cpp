#include "reference/model/reading/document.hpp"

#include <toml++/toml.h>

#include "reference/model/reading/characters.hpp"

namespace heraldgauge::model::reading {
namespace {

// Finds the byte at a line and column, both counted from 1, columns in code points as the parser counts them.
class Places {
 public:
  explicit Places(std::string_view text) : text_(text), lines_{0} {
    for (std::size_t byte = 0; byte < text.size(); byte += utf8_length(text.substr(byte))) {
      if (text[byte] == '\n') lines_.push_back(points_.size() + 1);
      points_.push_back(byte);
    }
  }

  // The characters from there that can belong to a number, a boolean, a date or a time.
  std::string literal_at(const toml::source_position& place) const {
    const std::size_t from = byte_at(place);
    std::size_t to = from;
    while (to < text_.size() && belongs_to_literal(text_[to])) ++to;
    return std::string(text_.substr(from, to - from));
  }

 private:
  static bool belongs_to_literal(char c) {
    return (c >= '0' && c <= '9') || (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') ||
           std::string_view("+-._:").find(c) != std::string_view::npos;
  }

  std::size_t byte_at(const toml::source_position& place) const {
    const std::size_t point = lines_.at(place.line - 1) + place.column - 1;
    return point < points_.size() ? points_[point] : text_.size();
  }

  std::string_view text_;
  std::vector<std::size_t> points_;  // byte of each code point
  std::vector<std::size_t> lines_;   // code point that starts each line
};

Node::Kind kind_of(const toml::node& node) {
  switch (node.type()) {
    case toml::node_type::string:
      return Node::Kind::text;
    case toml::node_type::integer:
    case toml::node_type::floating_point:
      return Node::Kind::number;
    case toml::node_type::boolean:
      return Node::Kind::boolean;
    case toml::node_type::array:
      return Node::Kind::array;
    case toml::node_type::table:
      return Node::Kind::table;
    default:
      return Node::Kind::date_or_time;
  }
}

int number(toml::source_index index) { return static_cast<int>(index); }

Node converted(const toml::node& node, const Places& places) {
  const toml::source_position& begin = node.source().begin;
  Node result{kind_of(node), "", {}, {}, number(begin.line), number(begin.column)};
  if (const auto* table = node.as_table()) {
    for (const auto& [key, value] : *table) {
      const toml::source_position& at = key.source().begin;
      result.members.push_back({std::string(key.str()), number(at.line), number(at.column), converted(value, places)});
    }
  } else if (const auto* array = node.as_array()) {
    for (const toml::node& item : *array) result.items.push_back(converted(item, places));
  } else if (const auto* text = node.as_string()) {
    result.text = text->get();
  } else {
    result.text = places.literal_at(begin);
  }
  return result;
}

std::string_view without_byte_order_mark(std::string_view text) {
  if (text.starts_with("\xef\xbb\xbf")) text.remove_prefix(3);
  return text;
}

// A word that `--set` takes as a text without quotes: psi+, ideal-pair.
bool is_bare_word(std::string_view text) {
  const auto is_letter = [](char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); };
  if (text.empty() || !is_letter(text.front()) || text == "true" || text == "false" || text == "inf" || text == "nan") {
    return false;
  }
  for (const char c : text) {
    if (!is_letter(c) && !(c >= '0' && c <= '9') && std::string_view("+-_.").find(c) == std::string_view::npos)
      return false;
  }
  return true;
}

}  // namespace

Expected<Node> parse_document(std::string_view text, const std::string& source) {
  text = without_byte_order_mark(text);
  if (auto fault = find_bad_characters(text, source)) return *fault;
  try {
    const toml::table table = toml::parse(text);
    return converted(table, Places(text));
  } catch (const toml::parse_error& error) {
    const toml::source_position& at = error.source().begin;
    return Fault{{source, number(at.line), number(at.column), ""}, std::string(error.description()), "TOML 1.0"};
  }
}

Expected<Node> parse_value(std::string_view text, const std::string& source) {
  if (is_bare_word(text)) return Node{Node::Kind::text, std::string(text), {}, {}, 0, 0};
  const Fault fault{{source, 0, 0, ""},
                    "the value is not one TOML value",
                    "a number, a text in quotes, a bare word, or an array of them"};
  const Expected<Node> document = parse_document("value = " + std::string(text), source);
  if (!document || document->members.size() != 1) return fault;
  return document->members.front().value;
}

std::string_view description(Node::Kind kind) {
  switch (kind) {
    case Node::Kind::text:
      return "a text";
    case Node::Kind::number:
      return "a number";
    case Node::Kind::boolean:
      return "a truth value";
    case Node::Kind::date_or_time:
      return "a date or time";
    case Node::Kind::array:
      return "an array";
    case Node::Kind::table:
      break;
  }
  return "a table";
}

}  // namespace heraldgauge::model::reading
