#pragma once
// One explanation of a table: what it is called, how much it assumes, and what it predicts.

#include <optional>
#include <string>
#include <vector>

#include "compare/causes/data.hpp"

namespace heraldgauge::compare {

struct HypothesisPart {
  std::string id;
  std::string kind;  // shortcut | convention | pattern
  std::optional<std::string> setting;
  std::string sentence;
};

struct Hypothesis {
  std::vector<HypothesisPart> parts;  // one; two where two causes act together
  // How much is assumed, in the order in which equally good explanations are preferred: registered causes before
  // patterns fitted to the table, one cause before two.
  int complexity = 0;
  Prediction prediction;
  bool from_the_table =
      false;  // predicts no number of its own, only how numbers scatter: `prediction` repeats the table
  Score score;
};

inline constexpr int complexity_of_departure = 1;
inline constexpr int complexity_of_setting = 1;  // on top
inline constexpr int complexity_of_pattern = 4;

// Whether an explanation is worth naming: it gives at least half of the wrong numbers, and spoils far fewer right ones.
bool is_plausible(const Data& data, const Score& score);
bool explains_everything(const Data& data, const Score& score);

}  // namespace heraldgauge::compare
