#pragma once
// The rules that both formats share.

#include <optional>
#include <string>
#include <vector>

#include "reference/model/fault.hpp"

namespace heraldgauge::compare {

// A fault at a place of a table; `offset` counts the bytes before it.
model::Fault table_fault(const std::string& source, std::size_t line, std::size_t offset, const std::string& wrong,
                         const std::string& allowed);

// What is wrong with a set of column names, as a clause: a name that is empty or stands twice, or too many of them.
std::optional<std::string> wrong_columns(const std::vector<std::string>& names);

}  // namespace heraldgauge::compare
