#include "reports/text.hpp"

#include <algorithm>
#include <array>

#include "reference/model/fault.hpp"
#include "reports/text_table.hpp"

namespace heraldgauge::reports {
namespace {

using model::printable;

// What a table leaves to the other formats: how a value was certified, and the reasons, which follow the table as
// notes.
constexpr std::array<std::string_view, 5> not_in_tables = {"exact", "reason", "cutoff", "tail_bound", "precision_bits"};

constexpr const char* key_caution =
    "A model's key rate is no security proof: it is asymptotic, without finite-size effects and without side channels. "
    "What may be relied on is decided by the parties' own security evaluation.";

bool in_tables(const Field& field) {
  return std::find(not_in_tables.begin(), not_in_tables.end(), field.name) == not_in_tables.end();
}

std::string shown(const Cell& cell) {
  const std::string content = plain(cell);
  return content.empty() ? "-" : printable(content);
}

std::string field_of(const Row& row, std::string_view name) {
  for (const Field& field : row) {
    if (field.name == name) return plain(field.cell);
  }
  return "";
}

std::string parameter_line(const Parameters& parameters) {
  std::string line;
  for (const auto& [key, value] : parameters) {
    line += (line.empty() ? "" : ", ") + printable(key) + " = " + printable(value);
  }
  return line;
}

std::vector<Cells> table_rows(const Document& document) {
  std::vector<Cells> rows(1);
  for (const auto& [key, value] : document.points.front().parameters) rows[0].push_back(printable(key));
  for (const Field& field : document.points.front().rows.front()) {
    if (in_tables(field)) rows[0].emplace_back(field.name);
  }
  for (const Point& point : document.points) {
    for (const Row& row : point.rows) {
      Cells& cells = rows.emplace_back();
      for (const auto& [key, value] : point.parameters) cells.push_back(printable(value));
      for (const Field& field : row) {
        if (in_tables(field)) cells.push_back(shown(field.cell));
      }
    }
  }
  return rows;
}

// The quantity on a line of its own, its other fields below it where present, one a line, long numbers grouped and
// wrapped.
std::string block(const Row& row, std::size_t columns) {
  std::string lines = shown(row.front().cell) + "\n";
  std::size_t label = 0;
  for (const Field& field : row) label = std::max(label, field.name.size());
  const std::size_t indent = label + 4;
  for (std::size_t i = 1; i < row.size(); ++i) {
    const Field& field = row[i];
    if (!in_tables(field) || std::holds_alternative<Absent>(field.cell)) continue;
    const std::string content =
        std::holds_alternative<Number>(field.cell) ? grouped(shown(field.cell)) : shown(field.cell);
    lines += "  " + std::string(field.name) + std::string(label - field.name.size() + 2, ' ') +
             wrapped(content, indent, indent, columns) + "\n";
  }
  return lines;
}

std::string blocks(const Document& document, std::size_t columns) {
  std::string lines;
  for (const Point& point : document.points) {
    if (!point.parameters.empty()) lines += wrapped(parameter_line(point.parameters), 0, 2, columns) + "\n";
    for (const Row& row : point.rows) lines += block(row, columns);
  }
  return lines;
}

// Why a value is missing or undecided, and the fraction that an exact value is.
std::string note_on(const Point& point, const Row& row) {
  const std::string subject =
      shown(row.front().cell) + (point.parameters.empty() ? "" : " at " + parameter_line(point.parameters));
  const std::string reason = field_of(row, "reason");
  if (!reason.empty()) return subject + ": " + field_of(row, "status") + ": " + printable(reason);
  const std::string exact = field_of(row, "exact");
  return exact.empty() ? "" : subject + " is exactly " + exact;
}

std::string notes(const Document& document, std::size_t columns) {
  std::string lines;
  for (const Point& point : document.points) {
    for (const Row& row : point.rows) {
      const std::string note = note_on(point, row);
      if (!note.empty()) lines += wrapped(note, 0, 2, columns) + "\n";
    }
  }
  return lines;
}

bool has_a_key(const Document& document) {
  const auto is_key = [](const Row& row) {
    const std::string quantity = field_of(row, "quantity");
    return quantity == "key_fraction" || quantity == "key_rate";
  };
  return std::any_of(document.points.begin(), document.points.end(),
                     [&](const Point& point) { return std::any_of(point.rows.begin(), point.rows.end(), is_key); });
}

std::size_t limit_of(const TextLayout& layout) {
  return layout.columns ? static_cast<std::size_t>(std::max(*layout.columns, 20)) : std::string::npos;
}

}  // namespace

std::string text(const Document& document, const TextLayout& layout) {
  const std::size_t columns = limit_of(layout);
  const std::vector<Cells> rows = table_rows(document);
  const TextTable table(rows);
  std::string lines = document.title.empty() ? "" : printable(document.title) + "\n\n";
  lines += table.width() <= columns ? table.text() : blocks(document, columns);
  const std::string remarks = notes(document, columns);
  if (!remarks.empty()) lines += "\n" + remarks;
  if (has_a_key(document)) lines += "\n" + wrapped(key_caution, 0, 0, std::min<std::size_t>(columns, 100)) + "\n";
  return lines;
}

std::string text(const ListReport& report, const TextLayout& layout) {
  std::size_t width = 0;
  for (const ListEntry& entry : report.entries) width = std::max(width, width_of(entry.id));
  std::string lines;
  for (const ListEntry& entry : report.entries) {
    std::string sentence = entry.sentence;
    for (const auto& [name, value] : entry.more) {
      if (!value.empty()) sentence += " [" + name + ": " + value + "]";
    }
    lines += entry.id + std::string(width - width_of(entry.id) + 2, ' ') +
             wrapped(sentence, width + 2, width + 2, limit_of(layout)) + "\n";
  }
  return lines;
}

}  // namespace heraldgauge::reports
