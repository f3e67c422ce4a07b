#pragma once
// CSV (RFC 4180, UTF-8, header row, lines end in CR LF), safe to open in a spreadsheet: text that a spreadsheet would
// take for a formula gets an apostrophe before it, numbers do not.

#include <string>

#include "reports/record/document.hpp"

namespace heraldgauge::reports {

// One row a point and result: the parameters first, then the fields of the result.
std::string csv(const Document& document);

std::string csv(const ListReport& report);

// A text as one cell: in quotes where it needs them, with an apostrophe before what looks like a formula.
std::string csv_text(const std::string& text);

}  // namespace heraldgauge::reports
