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

// A departure of the registries with one of its candidate settings, over scenarios drawn until it applies and some
// number moves by more than three tolerances; two, a change of the inputs under another departure, drawn until each
// alone moves some number so, and the two together do from each alone.
BlindTable table_with_one(Random& random);
BlindTable table_with_two(Random& random);

}  // namespace heraldgauge::test
