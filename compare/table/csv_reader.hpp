#pragma once
// Comma separated values (RFC 4180).

#include <optional>
#include <string>
#include <vector>

#include "compare/table/row.hpp"

namespace heraldgauge::compare {

// Reads from the header row to the end. Faults: a quote where none may stand, a quote that is never closed, a carriage
// return alone, bytes that are not UTF-8, a control character, a row with more or fewer cells than the header, a column
// name that is empty or stands twice, an empty table, a failed read.
std::optional<model::Fault> read_csv(ByteReader& bytes, const std::string& source, RowConsumer& consumer);

}  // namespace heraldgauge::compare
