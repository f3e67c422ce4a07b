#pragma once
// The program under test, run as a user runs it.

#include <string>
#include <vector>

#include "tests/support/process.hpp"

namespace heraldgauge::test {

std::string program_path();

ProcessResult heraldgauge(const std::vector<std::string>& arguments, const ProcessOptions& options = {});

// The same with a scenario on standard input.
ProcessResult heraldgauge(const std::vector<std::string>& arguments, const std::string& input);

// Runs a line of shell in which $PROGRAM is the program and $FOLDER a folder of the caller.
ProcessResult shell(const std::string& line, const TemporaryFolder& folder);

// One station, rational everywhere, asks for the herald probability: small and quick.
std::string small_scenario();

// The number of lines, each ended by a newline.
long line_count(const std::string& text);

}  // namespace heraldgauge::test
