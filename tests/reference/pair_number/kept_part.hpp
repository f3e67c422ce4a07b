#pragma once
// The kept part of a probability at stated cut-offs, without any tail, put together from the pieces of the route.

#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference::pair_number {

// Both analysers at the given angles, all sectors.
inline Interval kept_part(const HeraldedChain& link, const std::vector<long>& cutoffs, const EndAsk& left,
                          const EndAsk& right, const model::Rational& left_deg, const model::Rational& right_deg,
                          Precision bits) {
  const bool one_sector =
      keeps_polarisations(link.left_end(), left, left_deg) || keeps_polarisations(link.right_end(), right, right_deg);
  const long sectors = one_sector ? 0 : sectors_within(cutoffs);
  std::vector<SectorStack> states{
      end_elements(link.left_end(), Side::left, left, left_deg, cutoffs.front(), sectors, bits)};
  states = contract_stations(link, cutoffs, Strings::corrected, std::move(states), bits);
  return close_chain(
      states[0], end_elements(link.right_end(), Side::right, right, right_deg, cutoffs.back(), sectors, bits), bits);
}

}  // namespace heraldgauge::reference::pair_number
