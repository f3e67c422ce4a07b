#include "compare/fock/cut_sources.hpp"

namespace heraldgauge::compare {

Departure total_pair_cutoff() {
  Departure departure;
  departure.id = "total-pair-cutoff";
  departure.sentence = "All sources together keep at most m pairs.";
  departure.replaces = "the sum over all pair numbers by n_0 + ... + n_N <= m";
  departure.claimed = "lam far below 1; three pairs are often called enough";
  departure.source = "common practice";
  departure.setting = fock::pairs_kept();
  departure.setting->standard = 6;
  departure.setting->largest = 24;
  departure.touches = touches_probabilities;
  const auto change = [](fock::Description& description, const Setting& setting) {
    description.most_total = fock::kept(setting);
  };
  return fock::by_fock(std::move(departure), {fock::cuts_as_set, change, nullptr});
}

}  // namespace heraldgauge::compare
