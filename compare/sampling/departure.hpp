#pragma once
// What the shortcuts that answer by sampling have in common.

#include <optional>
#include <string>
#include <vector>

#include "compare/departure.hpp"
#include "compare/sampling/sample.hpp"

namespace heraldgauge::compare {

inline constexpr std::uint64_t sampling_seed = 20061;  // one fixed seed, so that answers repeat

// Whether a quantity is sampled: what depends on probabilities, but a stated pattern and the visibility.
bool is_sampled(const model::Quantity& quantity);

// Why a chain is not sampled: a shared background, more than four stations. Nothing where it is.
std::optional<std::string> not_sampled(const model::Chain& chain);

// The bases of the ends that quantities need.
std::vector<reference::Basis> bases_of(const std::vector<model::Quantity>& quantities);

// Quantities as relative frequencies among simulated trials, with what it took in `effort`.
std::vector<Value> by_sample(const Case& point, const std::vector<model::Quantity>& quantities, const Stop& stop);

}  // namespace heraldgauge::compare
