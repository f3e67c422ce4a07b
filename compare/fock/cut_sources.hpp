#pragma once
// What the shortcuts that cut off pair numbers have in common.

#include "compare/fock/departure.hpp"

namespace heraldgauge::compare::fock {

// The setting m, the pairs kept, and the number that one stands for.
SettingRange pairs_kept();
long kept(const Setting& setting);

// m pairs at every source: cut-offs for a recipe.
std::vector<long> cuts_as_set(const model::Chain& chain, const Setting& setting, double log2_tail);

}  // namespace heraldgauge::compare::fock
