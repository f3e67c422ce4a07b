#pragma once
// JSON, strict (RFC 8259): null where absent, results as strings, UTF-8 always valid.

#include <string>
#include <utility>
#include <vector>

#include "reports/record/document.hpp"

namespace heraldgauge::reports {

// {"schema": 1, "command": ..., "scenario": title, "points": [{"parameters": {...}, "results": [...]}]}, one result a
// line; with `versions` a member of that name before the points.
std::string json(const Document& document, const std::vector<std::pair<std::string, std::string>>& versions = {});

// [{"id": ..., "sentence": ..., ...}], one entry a line.
std::string json(const ListReport& report);

}  // namespace heraldgauge::reports
