#pragma once
// One run of a command, from arguments to exit status.

#include "compare/cli/arguments.hpp"
#include "compare/cli/exit_status.hpp"

namespace heraldgauge::cli {

ExitStatus run(const Arguments& arguments);

}  // namespace heraldgauge::cli
