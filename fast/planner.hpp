#pragma once
// Turns a chain's structure and the asked quantities into a plan.

#include <optional>
#include <vector>

#include "fast/modes.hpp"
#include "fast/visibility.hpp"
#include "reference/model/pattern.hpp"
#include "reference/model/quantity.hpp"

namespace heraldgauge::fast {

// Where in the plan each basis finds its pairings: first index, or -1 where it is not asked for.
struct Layout {
  int rectilinear = -1;  // 16 pairings, left outcome * 4 + right outcome
  int analyser = -1;     // the same
  int diagonal = -1;     // 4 pairings: left bit * 2 + right bit
  int samples = -1;      // contrast at equally spaced right angles
  int sample_count = 0;
  bool even_in_angle = false;    // samples cover phi = 0..pi only, both ends included
  int aligned_plus = -1;         // plus alone at right angles 0 and 90, where even
  std::optional<Circle> circle;  // of the samples
};

// Both detectors of an end have the same numbers.
bool alike(const EndNumbers& end);

struct Needs {
  bool rectilinear = false;
  bool analyser = false;
  bool diagonal = false;
  bool visibility = false;
};
Needs needs_of(const std::vector<model::Quantity>& quantities);

struct Planned {
  Plan plan;
  Layout layout;
};
Planned make_plan(const ChainNumbers& numbers, const ExactModes& modes, const Needs& needs, std::vector<int> cutoffs);

// The one probability of a free pattern, at the ends' own angles; no ask of it counts photons.
Plan make_pattern_plan(const ChainNumbers& numbers, const ExactModes& modes, const model::Pattern& pattern,
                       std::vector<int> cutoffs);

// Pairs to keep per source so that the tail is likely below 5e-14 of every number; none where a source would need more
// than largest_pairs. The kernel's bound decides whether it was enough.
std::optional<std::vector<int>> first_cutoffs(const ChainNumbers& numbers, const ExactModes& modes);
// A second guess after one that fell short; so many are made.
inline constexpr int most_attempts = 8;
std::optional<std::vector<int>> more_pairs(std::vector<int> cutoffs, const ChainNumbers& numbers);

}  // namespace heraldgauge::fast
