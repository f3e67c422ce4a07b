#include "compare/subset_sum/departure.hpp"

namespace heraldgauge::compare {

Departure subset_sum_binary64() {
  Departure departure;
  departure.id = "subset-sum-binary64";
  departure.sentence = "The exact signed sum over sets of silent detectors, carried out in binary64.";
  departure.replaces = "exact numbers by binary64, subsets in binary order";
  departure.claimed = "common events; the terms cancel where heralds are rare";
  departure.source = "common practice";
  return by_subset_sum(std::move(departure), subset_sum<double>);
}

}  // namespace heraldgauge::compare
