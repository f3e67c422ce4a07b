#pragma once
// The station operators of a chain in order, built one at a time; a station like the one before it is not built again.

#include <memory>
#include <vector>

#include "reference/pair_number/heralded_chain.hpp"

namespace heraldgauge::reference::pair_number {

class StationSequence {
 public:
  StationSequence(const HeraldedChain& link, const std::vector<long>& cutoffs, long sectors, Precision bits)
      : link_(link), cutoffs_(cutoffs), sectors_(sectors), bits_(bits) {}

  // Station k = 0..N-1; the reference is valid until the next call.
  const StationOperator& at(std::size_t k);

 private:
  const HeraldedChain& link_;
  const std::vector<long>& cutoffs_;
  long sectors_;
  Precision bits_;
  std::size_t built_ = 0;
  std::unique_ptr<StationOperator> station_;
};

}  // namespace heraldgauge::reference::pair_number
