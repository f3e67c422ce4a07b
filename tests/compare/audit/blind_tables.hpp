#pragma once
// Random scenarios and tables over them, made by the project's own evaluators, right or with planted departures.

#include <optional>
#include <string>
#include <vector>

#include "compare/departure.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {

struct BlindTable {
  std::string scenario;
  std::string csv;
  std::vector<std::string> planted;  // ids; empty for a clean table
  std::string note;                  // what was planted, with settings
};

enum class Evaluator { reference, fast };

BlindTable clean_table(Random& random, Evaluator evaluator);

// Drawn until some number moves by more than three tolerances; with two departures, until each alone does and the two
// together are neither of them.
BlindTable planted_table(Random& random, int departures);

}  // namespace heraldgauge::test
