#pragma once
// What a scenario asks for: quantities and a click pattern.

#include "reference/model/reading/items.hpp"
#include "reference/model/reading/plan.hpp"

namespace heraldgauge::model::reading {

// Names of quantities, in an array or as one text. Faults: unknown names, names given twice.
std::vector<Quantity> read_quantities(const Item& item, Collector& faults);

// A pattern over `stations` stations: a table with stations, left and right, each part a text such as "10*1" or an
// array of texts; or one array of texts for all detectors, stations first, then left, then right. Parts left out are
// not looked at.
std::optional<Pattern> read_pattern(const Item& item, std::size_t stations, Collector& faults);

// Counting needs a resolving detector.
void check_counts(const Item& item, const Pattern& pattern, const Plan& plan, Collector& faults);

}  // namespace heraldgauge::model::reading
