#pragma once
// Registered shortcuts and conventions as explanations of a table.

#include <vector>

#include "compare/causes/hypothesis.hpp"

namespace heraldgauge::compare {

// Every registered shortcut and convention that touches a quantity of the table and explains half of a few wrong
// numbers spread over it, each with the setting that explains most of all numbers.
std::vector<Hypothesis> single_departures(const Data& data, unsigned threads);

// Pairs of them: a change of the inputs under another departure, or a change of the outputs over one. Only those that
// are plausible.
std::vector<Hypothesis> departure_pairs(const Data& data, unsigned threads);

}  // namespace heraldgauge::compare
