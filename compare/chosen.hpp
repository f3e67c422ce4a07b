#pragma once
// Shortcuts as they are asked for on the command line: an id, or an id with its setting, "pair-cutoff=4".

#include <string>
#include <vector>

#include "compare/departure_error.hpp"

namespace heraldgauge::compare {

// Every fault: unknown ids (with the nearest known one), settings out of range. No text: all shortcuts with their
// standard settings. Conventions count as shortcuts where they are named.
model::Expected<std::vector<Chosen>> chosen_shortcuts(const std::vector<std::string>& texts);

std::optional<std::string> setting_text(const Setting& setting);

}  // namespace heraldgauge::compare
