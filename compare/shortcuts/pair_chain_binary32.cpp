#include "compare/chain_edits.hpp"
#include "compare/fock/departure.hpp"
#include "compare/other_chain.hpp"

namespace heraldgauge::compare {

Departure pair_chain_binary32() {
  Departure departure;
  departure.id = "pair-chain-binary32";
  departure.sentence = "The chain of pair-number matrices in binary32, at most m pairs a source.";
  departure.replaces = "exact numbers by binary32 and the sum over all pair numbers by n_k <= m";
  departure.claimed = "five digits; all terms of a herald are non-negative";
  departure.source = "common practice";
  departure.setting = SettingRange{"m", "pairs kept", 1, 10, true, 6, {2, 4, 6, 8}};
  departure.touches = touches_probabilities;
  departure.value_is_the_machine_number = true;
  departure.evaluate = [](const Case& point, const std::vector<model::Quantity>& quantities, const Setting& setting) {
    if (has_background(point.chain)) return declined(quantities, "a shared background is not served");
    const std::vector<long> cuts(point.chain.sources.size(), setting->get_num().get_si());
    return fock::values_in<float>(fock::model_description(point.chain, cuts), point, quantities);
  };
  return departure;
}

}  // namespace heraldgauge::compare
