#pragma once
// Versions of this program and of the libraries whose rounding its certificates rest on.

#include <string>
#include <utility>
#include <vector>

namespace heraldgauge::compare {

std::string program_version();

// {"heraldgauge", "0.1.0"}, {"GMP", ...}, {"MPFR", ...}, {"MPFI", ...}: the libraries as loaded, not as compiled
// against.
std::vector<std::pair<std::string, std::string>> library_versions();

}  // namespace heraldgauge::compare
