#include "compare/subset_sum/departure.hpp"

namespace heraldgauge::compare {

Departure subset_sum_binary32() {
  Departure departure;
  departure.id = "subset-sum-binary32";
  departure.sentence = "The exact signed sum over sets of silent detectors, carried out in binary32.";
  departure.replaces = "exact numbers by binary32, subsets in binary order";
  departure.claimed = "common events; the terms cancel where heralds are rare";
  departure.source = "common practice";
  return by_subset_sum(std::move(departure), subset_sum<float>);
}

}  // namespace heraldgauge::compare
