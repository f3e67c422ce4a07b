#pragma once
// The pair-number route: the chain as a product of transfer matrices over the numbers of photon pairs, cut off where a
// proven bound on what is left out allows it. It shares no formula with the determinant route. It serves what that
// route does, and number-resolving detectors and ideal pairs besides, at a cost that is linear in the number of
// stations.
//
// Every result is [kept, kept + tail], with all pair numbers up to the cut-offs kept and every operation rounded
// outward. BOUNDS.md states and proves the bounds. A number-resolving detector clicks where it registers at least one
// photon or dark event.

#include <memory>
#include <optional>
#include <string>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference {

// What the route cannot serve, as a clause ("source 2 has a pair parameter above 0.95 ..."), or nothing.
std::optional<std::string> pair_number_refusal(const model::Chain& chain);
// The same for a pattern of this chain: counts above 0 at a place with a shared background are not served.
std::optional<std::string> pair_number_refusal(const model::Chain& chain, const model::Pattern& pattern);

// Requires that nothing is refused. Accuracy::log2_tail must be finite.
std::unique_ptr<Route> make_pair_number_route(const model::Chain& chain);

// Predicted number of interval multiplications of one ends(); needs_all_delta: both analysers away from multiples of 90
// degrees, N > 0. herald() costs about a quarter of the smaller figure. An estimate within a factor of about 2.
double pair_number_cost(const model::Chain& chain, const Accuracy& accuracy, bool needs_all_delta);

// log2 of the herald probability, roughly (a few tenths where sources are weak, never for a certificate): what
// log2_tail may be aimed at. -infinity where no herald can occur.
double pair_number_log2_herald(const model::Chain& chain);

}  // namespace heraldgauge::reference
