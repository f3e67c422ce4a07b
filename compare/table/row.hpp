#pragma once
// What both table formats are read into: a header, then row after row.

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "compare/table/bytes.hpp"
#include "reference/model/fault.hpp"

namespace heraldgauge::compare {

struct TableRow {
  std::vector<std::string> cells;  // one a column; empty where the table has nothing there
  std::size_t line = 0;            // where the row starts, from 1
  std::size_t offset = 0;          // bytes before it, from 0
};

// Takes a table as it is read. A fault returned ends the reading.
class RowConsumer {
 public:
  virtual ~RowConsumer() = default;
  virtual std::optional<model::Fault> columns(const std::vector<std::string>& names) = 0;
  virtual std::optional<model::Fault> row(TableRow&& row) = 0;
};

// Reads a table to its end: a JSON array of objects where the first character that is not blank is a bracket or a
// brace, else CSV. `source` is the file's name for messages. The first fault of form, or the consumer's.
//
// CSV as in RFC 4180, UTF-8, with a header row; lines end in CR LF or LF. JSON: one flat object a row, all with the
// same members; a number keeps the digits it was written with, null is an empty cell.
std::optional<model::Fault> read_table(ByteSource bytes, const std::string& source, RowConsumer& consumer);

// Longest cell, and most columns, of either format.
inline constexpr std::size_t longest_cell = 20000;
inline constexpr std::size_t most_columns = 4096;

}  // namespace heraldgauge::compare
