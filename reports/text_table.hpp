#pragma once
// Layout of text: columns padded to equal width, long numbers in groups.

#include <cstddef>
#include <string>
#include <vector>

namespace heraldgauge::reports {

using Cells = std::vector<std::string>;

// Number of code points of UTF-8 text: what an ordinary character takes on a terminal.
std::size_t width_of(const std::string& text);

// Rows of equally many cells, padded so that columns line up, two blanks apart, none at the end of a line.
class TextTable {
 public:
  explicit TextTable(const std::vector<Cells>& rows);
  std::size_t width() const;
  std::string text() const;

 private:
  const std::vector<Cells>& rows_;
  std::vector<std::size_t> widths_;
};

// A number with the digits after its point in groups of ten, set apart by blanks: "0.1234567890 1234 e-9". Numbers that
// need no more than one group stay as they are.
std::string grouped(const std::string& number);

// Words put into lines of at most `columns`, the lines after the first indented; a word that is too long stands alone.
std::string wrapped(const std::string& words, std::size_t first_indent, std::size_t indent, std::size_t columns);

}  // namespace heraldgauge::reports
