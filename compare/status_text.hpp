#pragma once

#include <string>

#include "fast/evaluate.hpp"

namespace heraldgauge::compare {

// The word for a binary64 status in records: "computed", "undefined" or "declined".
std::string status_text(fast::Status status);

}  // namespace heraldgauge::compare
