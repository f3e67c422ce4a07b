#include "compare/table/columns.hpp"

#include <set>

#include "compare/table/row.hpp"

namespace heraldgauge::compare {

model::Fault table_fault(const std::string& source, std::size_t line, std::size_t offset, const std::string& wrong,
                         const std::string& allowed) {
  return {{source + ":" + std::to_string(line), 0, 0, ""}, wrong + " (byte " + std::to_string(offset) + ")", allowed};
}

std::optional<std::string> wrong_columns(const std::vector<std::string>& names) {
  if (names.size() > most_columns) return std::to_string(names.size()) + " columns";
  std::set<std::string> seen;
  for (std::size_t i = 0; i < names.size(); ++i) {
    if (names[i].empty()) return "column " + std::to_string(i + 1) + " has no name";
    if (!seen.insert(names[i]).second) return "the column '" + names[i] + "' stands twice";
  }
  return std::nullopt;
}

}  // namespace heraldgauge::compare
