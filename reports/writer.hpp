#pragma once
// Writers: one record, several formats. A writer computes nothing.

#include <iosfwd>
#include <optional>
#include <string_view>

#include "reports/record/results.hpp"

namespace heraldgauge::reports {

enum class Format { text, json, csv };

std::optional<Format> find_format(std::string_view name);

}  // namespace heraldgauge::reports
