#include "reference/model/fault.hpp"

#include <fmt/format.h>

namespace heraldgauge::model {

std::string printable(std::string_view text) {
  std::string shown;
  for (const char c : text) {
    const auto byte = static_cast<unsigned char>(c);
    if (byte < 0x20 || byte == 0x7f) {
      shown += fmt::format("\\x{:02x}", byte);
    } else {
      shown += c;
    }
  }
  return shown;
}

std::string describe(const Fault& fault) {
  const Location& at = fault.location;
  std::string line = at.source;
  if (at.line > 0) line += fmt::format(":{}:{}", at.line, at.column);
  if (!at.key.empty()) line += (line.empty() ? "" : ": ") + at.key;
  line += (line.empty() ? "" : ": ") + fault.wrong;
  if (!fault.allowed.empty()) line += "; allowed: " + fault.allowed;
  return printable(line);
}

}  // namespace heraldgauge::model
