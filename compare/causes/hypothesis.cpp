#include "compare/causes/hypothesis.hpp"

namespace heraldgauge::compare {

bool is_plausible(const Data& data, const Score& score) {
  return score.wrong_explained > 0 && 2 * score.wrong_explained >= data.wrong_count &&
         2 * score.right_broken <= score.wrong_explained;
}

bool explains_everything(const Data& data, const Score& score) { return score.explained == data.targets.size(); }

}  // namespace heraldgauge::compare
