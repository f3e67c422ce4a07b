#pragma once
// Runs Python (with mpmath) as a third, independent voice.

#include <string>
#include <vector>

namespace heraldgauge::test {

// What a script, or a script file of tests/support given `input`, prints, line by line. Throws where it fails.
std::vector<std::string> python_lines(const std::string& script);
std::vector<std::string> python_lines(const std::string& file, const std::string& input);

}  // namespace heraldgauge::test
