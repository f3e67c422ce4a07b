#include "compare/fock/cut_sources.hpp"

namespace heraldgauge::compare {

Departure pair_cutoff_per_mode() {
  Departure departure;
  departure.id = "pair-cutoff-per-mode";
  departure.sentence = "Each mode, H and V apart, keeps at most m photons.";
  departure.replaces = "the sum over all photon numbers by h_k <= m and v_k <= m";
  departure.claimed = "lam far below 1; three pairs are often called enough";
  departure.source = "common practice";
  departure.setting = fock::pairs_kept();
  departure.setting->largest = 20;
  departure.touches = touches_probabilities;
  const auto cuts = [](const model::Chain& chain, const Setting& setting, double) {
    return std::vector<long>(chain.sources.size(), 2 * fock::kept(setting));
  };
  const auto change = [](fock::Description& description, const Setting& setting) {
    description.most_per_mode = fock::kept(setting);
  };
  return fock::by_fock(std::move(departure), {cuts, change, nullptr});
}

}  // namespace heraldgauge::compare
