#include "reference/model/chain.hpp"

#include <algorithm>

namespace heraldgauge::model {

Chain mirrored(const Chain& chain) {
  Chain mirror = chain;
  std::reverse(mirror.sources.begin(), mirror.sources.end());
  std::reverse(mirror.stations.begin(), mirror.stations.end());
  mirror.left_arms.assign(chain.right_arms.rbegin(), chain.right_arms.rend());
  mirror.right_arms.assign(chain.left_arms.rbegin(), chain.left_arms.rend());
  std::swap(mirror.left_end, mirror.right_end);
  return mirror;
}

}  // namespace heraldgauge::model
