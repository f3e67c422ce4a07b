#pragma once
// A TOML document as plain nodes, each with its place; numbers keep the text they were written with.

#include <string>
#include <string_view>
#include <vector>

#include "reference/model/fault.hpp"

namespace heraldgauge::model::reading {

struct Member;

struct Node {
  enum class Kind { text, number, boolean, date_or_time, array, table };
  Kind kind = Kind::table;
  std::string text;             // of a text: its content; of a number, boolean, date or time: the literal as written
  std::vector<Node> items;      // of an array
  std::vector<Member> members;  // of a table, in no particular order
  int line = 0;
  int column = 0;
};

struct Member {
  std::string key;
  int line = 0;
  int column = 0;
  Node value;
};

// The root table of a TOML 1.0 text, or the first fault in it. A byte order mark is skipped.
Expected<Node> parse_document(std::string_view text, const std::string& source);

// One TOML value, as `--set` takes it; a bare word counts as a text.
Expected<Node> parse_value(std::string_view text, const std::string& source);

// What a node is, for messages: "a text", "an array".
std::string_view description(Node::Kind kind);

}  // namespace heraldgauge::model::reading
