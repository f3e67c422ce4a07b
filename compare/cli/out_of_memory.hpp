#pragma once
// What the multiple-precision libraries do where memory runs out: they cannot report it, so the program ends with the
// exit status of a failed machine instead of the abort that is their default.

namespace heraldgauge::cli {

void end_where_memory_runs_out();

}  // namespace heraldgauge::cli
