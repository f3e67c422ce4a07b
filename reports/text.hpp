#pragma once
// Text for people: one aligned table for all points, or stacked blocks with grouped digits where a terminal is too
// narrow for the table. Control characters in foreign text are shown as \xNN.

#include <string>

#include "reports/record/document.hpp"
#include "reports/writer.hpp"

namespace heraldgauge::reports {

std::string text(const Document& document, const TextLayout& layout);

// An id and a sentence a line.
std::string text(const ListReport& report, const TextLayout& layout);

}  // namespace heraldgauge::reports
