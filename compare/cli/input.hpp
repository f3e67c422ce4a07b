#pragma once
// Reading what the user names.

#include <string>

#include "reference/model/fault.hpp"

namespace heraldgauge::cli {

// The whole of a file, or of standard input for "-". Faults where it cannot be read, is a folder, or is longer than 16
// MiB.
model::Expected<std::string> read_input(const std::string& name);

}  // namespace heraldgauge::cli
