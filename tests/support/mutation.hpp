#pragma once
// Damaged texts, for tests of readers.

#include <string>

#include "tests/support/effort.hpp"

namespace heraldgauge::test {

// The text after one to three changes: digits or bytes replaced, pieces left out or repeated, the rest cut off, and
// words put in that readers stumble over (numbers out of range or in other notations, marks, broken UTF-8).
std::string mutated(Random& random, std::string text);

}  // namespace heraldgauge::test
