#include "reports/csv.hpp"

#include "reference/model/exact_number.hpp"

namespace heraldgauge::reports {
namespace {

bool looks_like_a_formula(const std::string& text) {
  return !text.empty() && std::string_view("=+-@\t\r").find(text.front()) != std::string_view::npos;
}

std::string quoted(const std::string& text) {
  if (text.find_first_of(",\"\r\n") == std::string::npos) return text;
  std::string result = "\"";
  for (const char c : text) result += c == '"' ? "\"\"" : std::string(1, c);
  return result + "\"";
}

std::string cell_text(const Cell& cell) {
  return std::holds_alternative<Text>(cell) ? csv_text(std::get<Text>(cell).text) : plain(cell);
}

class Line {
 public:
  void add(const std::string& cell) {
    text_ += (empty_ ? "" : ",") + cell;
    empty_ = false;
  }
  std::string ended() const { return text_ + "\r\n"; }

 private:
  std::string text_;
  bool empty_ = true;
};

std::string header(const Point& point) {
  Line line;
  for (const auto& [key, value] : point.parameters) line.add(csv_text(key));
  for (const Field& field : point.rows.front()) line.add(std::string(field.name));
  return line.ended();
}

std::string row_text(const Parameters& parameters, const Row& row) {
  Line line;
  for (const auto& [key, value] : parameters) line.add(csv_text(value));
  for (const Field& field : row) line.add(cell_text(field.cell));
  return line.ended();
}

}  // namespace

std::string csv_text(const std::string& text) {
  return quoted(looks_like_a_formula(text) && !model::parse_exact(text) ? "'" + text : text);
}

std::string csv(const Document& document) {
  std::string lines = header(document.points.front());
  for (const Point& point : document.points) {
    for (const Row& row : point.rows) lines += row_text(point.parameters, row);
  }
  return lines;
}

std::string csv(const ListReport& report) {
  Line head;
  head.add("id");
  head.add("sentence");
  for (const auto& [name, value] : report.entries.front().more) head.add(name);
  std::string lines = head.ended();
  for (const ListEntry& entry : report.entries) {
    Line line;
    line.add(csv_text(entry.id));
    line.add(csv_text(entry.sentence));
    for (const auto& [name, value] : entry.more) line.add(csv_text(value));
    lines += line.ended();
  }
  return lines;
}

}  // namespace heraldgauge::reports
