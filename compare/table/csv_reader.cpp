#include "compare/table/csv_reader.hpp"

#include <utility>

#include "compare/table/columns.hpp"
#include "reference/model/reading/characters.hpp"

namespace heraldgauge::compare {
namespace {

using model::Fault;

// Offset of the first byte of `text` that belongs to no UTF-8 character or to a control character other than tab and
// line ends; npos where there is none.
std::size_t first_bad_byte(const std::string& text) {
  for (std::size_t i = 0; i < text.size();) {
    const auto byte = static_cast<unsigned char>(text[i]);
    if (byte < 0x80U) {
      const bool allowed = byte >= 0x20U || byte == '\t' || byte == '\n' || byte == '\r';
      if (!allowed || byte == 0x7fU) return i;
      ++i;
      continue;
    }
    const std::size_t length = model::reading::utf8_length(std::string_view(text).substr(i));
    if (length == 0) return i;
    i += length;
  }
  return std::string::npos;
}

class CsvReader {
 public:
  CsvReader(ByteReader& bytes, const std::string& source) : bytes_(bytes), source_(source) {}

  std::optional<Fault> read(RowConsumer& consumer) {
    TableRow header;
    if (auto fault = read_record(header)) return fault;
    if (ended_) return at(0, 1, "the table is empty", "a header row, then rows");
    if (auto fault = judge_header(header)) return fault;
    if (auto fault = consumer.columns(header.cells)) return fault;
    for (;;) {
      TableRow row;
      row.cells.reserve(columns_);
      if (auto fault = read_record(row)) return fault;
      if (ended_) return std::nullopt;
      if (is_blank(row)) {
        if (!blank_) blank_ = std::pair(row.line, row.offset);
        continue;
      }
      if (auto fault = judge_row(row)) return fault;
      if (auto fault = consumer.row(std::move(row))) return fault;
    }
  }

 private:
  Fault at(std::size_t offset, std::size_t line, const std::string& wrong, const std::string& allowed) const {
    return table_fault(source_, line, offset, wrong, allowed);
  }
  Fault here(const std::string& wrong, const std::string& allowed) const {
    return at(bytes_.offset(), bytes_.line(), wrong, allowed);
  }

  // A line without anything: the end of a table may have some, its middle none (unless a cell may be empty there).
  bool is_blank(const TableRow& row) const { return columns_ > 1 && row.cells.size() == 1 && row.cells[0].empty(); }

  std::optional<Fault> judge_header(const TableRow& header) {
    columns_ = header.cells.size();
    const auto wrong = wrong_columns(header.cells);
    const bool semicolons = columns_ == 1 && header.cells[0].find(';') != std::string::npos;
    if (semicolons) return at(header.offset, header.line, "cells are separated by semicolons", "commas between cells");
    if (wrong) return at(header.offset, header.line, *wrong, "distinct names of keys, addresses and quantities");
    return std::nullopt;
  }

  std::optional<Fault> judge_row(const TableRow& row) const {
    if (blank_) return at(blank_->second, blank_->first, "an empty line among the rows", "rows without gaps");
    if (row.cells.size() == columns_) return std::nullopt;
    const std::string hint = row.cells.size() > columns_ ? "; are decimals written with a comma?" : "";
    return at(
        row.offset, row.line,
        "the row has " + std::to_string(row.cells.size()) + " cells, the header " + std::to_string(columns_) + hint,
        "as many cells as the header, a point before the decimals");
  }

  std::optional<Fault> read_record(TableRow& row) {
    row.line = bytes_.line();
    row.offset = bytes_.offset();
    if (bytes_.peek() == ByteReader::end) {
      ended_ = true;
      return bytes_.failed() ? std::optional(here("the table cannot be read to its end", "a readable file"))
                             : std::nullopt;
    }
    for (;;) {
      if (row.cells.size() == most_columns)
        return here("more than " + std::to_string(most_columns) + " cells in a row", "");
      const bool quoted = bytes_.peek() == '"';
      if (auto fault = quoted ? read_quoted(row.cells.emplace_back()) : read_bare(row.cells.emplace_back()))
        return fault;
      if (bytes_.peek() != ',') break;
      bytes_.take();
    }
    return read_line_end();
  }

  std::optional<Fault> read_bare(std::string& cell) {
    const std::size_t offset = bytes_.offset();
    const std::size_t line = bytes_.line();
    for (;;) {
      bytes_.take_until(',', '\n', '\r', '"', cell);
      if (cell.size() > longest_cell) return too_long(offset, line);
      const int next = bytes_.peek();
      if (next == '"') return here("a quote inside a cell that does not start with one", "quotes round the whole cell");
      if (next == ',' || next == '\n' || next == '\r' || next == ByteReader::end) return judge_text(cell, offset, line);
    }
  }

  std::optional<Fault> read_quoted(std::string& cell) {
    const std::size_t offset = bytes_.offset();
    const std::size_t line = bytes_.line();
    bytes_.take();
    for (;;) {
      bytes_.take_until('"', '\n', '\n', '\n', cell);
      if (cell.size() > longest_cell) return too_long(offset, line);
      const int next = bytes_.peek();
      if (next == ByteReader::end) return at(offset, line, "a quote that is never closed", "a closing quote");
      if (next == '"') {
        bytes_.take();
        if (bytes_.peek() != '"') return judge_text(cell, offset + 1, line);
        bytes_.take();
        cell += '"';
      } else if (next == '\n') {
        bytes_.take();
        cell += '\n';
      }
    }
  }

  std::optional<Fault> read_line_end() {
    const int next = bytes_.peek();
    if (next == ByteReader::end) return std::nullopt;
    if (next != '\r' && next != '\n') return here("text after a closing quote", "a comma or the end of the line");
    bytes_.take();
    if (next == '\n') return std::nullopt;
    if (bytes_.peek() != '\n') return here("a carriage return without a line feed", "lines that end in CR LF or LF");
    bytes_.take();
    return std::nullopt;
  }

  std::optional<Fault> judge_text(const std::string& cell, std::size_t offset, std::size_t line) const {
    const std::size_t bad = first_bad_byte(cell);
    if (bad == std::string::npos) return std::nullopt;
    return at(offset + bad, line, "a byte that is no text in UTF-8", "UTF-8 without control characters");
  }

  Fault too_long(std::size_t offset, std::size_t line) const {
    return at(offset, line, "a cell of more than " + std::to_string(longest_cell) + " bytes; is a quote left open?",
              "shorter cells");
  }

  ByteReader& bytes_;
  const std::string& source_;
  std::size_t columns_ = 0;
  bool ended_ = false;
  std::optional<std::pair<std::size_t, std::size_t>> blank_;  // line and offset of the first line without anything
};

}  // namespace

std::optional<Fault> read_csv(ByteReader& bytes, const std::string& source, RowConsumer& consumer) {
  return CsvReader(bytes, source).read(consumer);
}

}  // namespace heraldgauge::compare
