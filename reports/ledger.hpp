#pragma once
// Writers of the ledger and of frontiers.

#include "reports/record/ledger.hpp"
#include "reports/writer.hpp"

namespace heraldgauge::reports {

// JSON: {"points": [{"parameters", "shortcuts": [...]}], "summary", "pairs", "costs", "breaches"}. CSV: one row a
// point, shortcut and quantity, the parameters first. Text: aligned tables.
std::string write(const LedgerReport& report, Format format, const TextLayout& layout = {});

// JSON: one object, with the bracket or the map. CSV: a row for the bracket, or one a map point. Text: the same as a
// table.
std::string write(const FrontierReport& report, Format format, const TextLayout& layout = {});

}  // namespace heraldgauge::reports
