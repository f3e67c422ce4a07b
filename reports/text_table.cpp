#include "reports/text_table.hpp"

#include <algorithm>
#include <sstream>

namespace heraldgauge::reports {
namespace {

constexpr std::size_t gap = 2;
constexpr std::size_t group = 10;

std::string without_trailing_blanks(std::string line) {
  line.erase(line.find_last_not_of(' ') + 1);
  return line;
}

std::vector<std::string> words_of(const std::string& text) {
  std::istringstream stream(text);
  std::vector<std::string> words;
  for (std::string word; stream >> word;) words.push_back(word);
  return words;
}

}  // namespace

std::size_t width_of(const std::string& text) {
  const auto starts_code_point = [](char c) { return (static_cast<unsigned char>(c) & 0xc0U) != 0x80U; };
  return static_cast<std::size_t>(std::count_if(text.begin(), text.end(), starts_code_point));
}

TextTable::TextTable(const std::vector<Cells>& rows) : rows_(rows), widths_(rows.front().size()) {
  for (const Cells& row : rows_) {
    for (std::size_t column = 0; column < row.size(); ++column) {
      widths_[column] = std::max(widths_[column], width_of(row[column]));
    }
  }
}

std::size_t TextTable::width() const {
  std::size_t total = gap * (widths_.size() - 1);
  for (const std::size_t width : widths_) total += width;
  return total;
}

std::string TextTable::text() const {
  std::string lines;
  for (const Cells& row : rows_) {
    std::string line;
    for (std::size_t column = 0; column < row.size(); ++column) {
      line += row[column] + std::string(widths_[column] - width_of(row[column]) + gap, ' ');
    }
    lines += without_trailing_blanks(line) + "\n";
  }
  return lines;
}

std::string grouped(const std::string& number) {
  const std::size_t first = number.find('.') + 1;  // 0 where there is no point
  const std::size_t last = std::min(number.find('e'), number.size());
  if (first == 0 || last - first <= group) return number;
  std::string result = number.substr(0, first);
  for (std::size_t at = first; at < last; at += group) {
    result += number.substr(at, std::min(group, last - at)) + (at + group < last ? " " : "");
  }
  return result + (last < number.size() ? " " + number.substr(last) : "");
}

std::string wrapped(const std::string& words, std::size_t first_indent, std::size_t indent, std::size_t columns) {
  std::string lines;
  std::size_t used = first_indent;
  bool line_is_empty = true;
  for (const std::string& word : words_of(words)) {
    const std::size_t needed = width_of(word) + (line_is_empty ? 0 : 1);
    if (!line_is_empty && used + needed > columns) {
      lines += "\n" + std::string(indent, ' ');
      used = indent;
      line_is_empty = true;
    }
    lines += (line_is_empty ? "" : " ") + word;
    used += width_of(word) + (line_is_empty ? 0 : 1);
    line_is_empty = false;
  }
  return lines;
}

}  // namespace heraldgauge::reports
