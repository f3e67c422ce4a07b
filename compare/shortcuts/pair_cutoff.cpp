#include "compare/fock/cut_sources.hpp"

namespace heraldgauge::compare {

Departure pair_cutoff() {
  Departure departure;
  departure.id = "pair-cutoff";
  departure.sentence = "Each source keeps at most m pairs, H and V together; nothing is renormalised.";
  departure.replaces = "the sum over all pair numbers by n_k <= m";
  departure.claimed = "lam far below 1; three pairs are often called enough";
  departure.source = "common practice";
  departure.setting = fock::pairs_kept();
  departure.touches = touches_probabilities;
  return fock::by_fock(std::move(departure), {fock::cuts_as_set, [](fock::Description&, const Setting&) {}, nullptr});
}

}  // namespace heraldgauge::compare
