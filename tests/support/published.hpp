#pragma once
// The published closed forms and numbers of tests/published/published.json, every number kept as the text that was
// typed.

#include <map>
#include <string>
#include <string_view>
#include <vector>

#include "reference/model/rational.hpp"

namespace heraldgauge::test {

// Number, limit or choice by name, as text.
using Texts = std::map<std::string, std::string>;

struct PublishedCase {
  Texts parameters;
  Texts values;
};

// A number that a source prints, with how it is known and how it compares.
struct PublishedPrint {
  std::string what;
  std::string printed;
  std::string confirmed;  // read-in-source or from-memory
  std::string agreement;
};

struct PublishedEntry {
  std::string id;
  std::string title;
  std::string source;
  std::string formula;
  std::string confirmed;  // how the formula is known: read-in-source, from-memory, own-derivation
  std::vector<PublishedCase> cases;
  std::vector<PublishedPrint> printed;
};

std::vector<PublishedEntry> published_entries();
// The entry of that id; throws where there is none.
PublishedEntry published_entry(std::string_view id);

// A decimal or fraction that a test wrote itself, exactly; throws where the text is none.
model::Rational exact_decimal(std::string_view text);
// Half a unit of the last digit of a decimal: "1.25e-3" -> 5e-6 ("12" -> 1/2).
model::Rational half_unit_of_last_digit(std::string_view text);

}  // namespace heraldgauge::test
