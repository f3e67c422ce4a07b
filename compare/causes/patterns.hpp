#pragma once
// Regular differences that no registered cause names: a factor, an offset, displaced rows, a stretched or displaced
// axis, noise.

#include <vector>

#include "compare/causes/hypothesis.hpp"

namespace heraldgauge::compare {

// `constant-factor`: given = c * exact; `constant-offset`: given = exact + c. c is the number that suits most of the
// quantities with wrong numbers, written as shortly as the tolerances allow; at least three different exact values.
std::vector<Hypothesis> constant_patterns(const Data& data);

// `shifted-rows`: given = exact value of the row s above or below. Requires a table that was read whole.
std::vector<Hypothesis> shifted_rows(const Data& data);

// `axis-factor`, `axis-offset`: given = exact value at c * p or p + c, p one numeric parameter of the table.
std::vector<Hypothesis> axis_patterns(const Data& data, unsigned threads);

// `round-off`: small differences of both signs without order, as a machine's rounding leaves them.
std::vector<Hypothesis> round_off_pattern(const Data& data);

}  // namespace heraldgauge::compare
