#pragma once
// Volume and seeds of randomised tests. HERALDGAUGE_TEST_EFFORT multiplies the number of cases (default 1, any positive
// number); HERALDGAUGE_TEST_SEED replaces the seed; HERALDGAUGE_TEST_CASE runs one case alone. Every failure prints
// seed and case, which replay it.

#include <cstdint>
#include <functional>
#include <random>

namespace heraldgauge::test {

using Random = std::mt19937_64;

// max(1, round(cases * effort)).
int scaled(int cases);

// Runs body(random) for each case, with a generator that depends on seed and case number only, under a trace that names
// both.
void for_each_case(int cases, std::uint64_t seed, const std::function<void(Random&)>& body);

}  // namespace heraldgauge::test
