#include "compare/fock/cut_sources.hpp"
#include "compare/fock/weights.hpp"

namespace heraldgauge::compare {

Departure pair_cutoff_renormalised() {
  Departure departure;
  departure.id = "pair-cutoff-renormalised";
  departure.sentence = "Each source keeps at most m pairs, and its kept amplitudes are normalised.";
  departure.replaces = "pi(n) by pi(n) / P(n <= m)";
  departure.claimed = "lam far below 1; three pairs are often called enough";
  departure.source = "common practice";
  departure.setting = fock::pairs_kept();
  departure.touches = touches_probabilities;
  const auto change = [](fock::Description& description, const Setting&) {
    for (auto& weights : description.weights) weights = fock::renormalised(weights);
  };
  return fock::by_fock(std::move(departure), {fock::cuts_as_set, change, nullptr});
}

}  // namespace heraldgauge::compare
