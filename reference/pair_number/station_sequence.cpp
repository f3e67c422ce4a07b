#include "reference/pair_number/station_sequence.hpp"

namespace heraldgauge::reference::pair_number {

const StationOperator& StationSequence::at(std::size_t k) {
  const bool same = station_ != nullptr && cutoffs_[built_] == cutoffs_[k] && cutoffs_[built_ + 1] == cutoffs_[k + 1] &&
                    link_.station(built_) == link_.station(k);
  if (!same) {
    station_ = std::make_unique<StationOperator>(link_.station(k), cutoffs_[k], cutoffs_[k + 1], sectors_, bits_);
    built_ = k;
  }
  return *station_;
}

}  // namespace heraldgauge::reference::pair_number
