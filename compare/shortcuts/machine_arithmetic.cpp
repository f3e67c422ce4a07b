// The exact formulas computed in a machine arithmetic: what a direct program returns is the value, so its error is
// certified as it stands.

#include <algorithm>

#include "compare/fock/departure.hpp"
#include "compare/other_chain.hpp"
#include "compare/quantities_binary64.hpp"
#include "compare/shortcuts/subset_sum_binary64.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using reference::Basis;
using reference::EndTable;

using SubsetSumOf = model::Expected<SubsetSum> (*)(const model::Chain&);

// One subset sum for each angle basis that is asked for.
class SubsetSums : public Probabilities64 {
 public:
  SubsetSums(const model::Chain& chain, SubsetSumOf sum) : chain_(chain), sum_(sum) {}
  double herald() override { return sum_(chain_)->herald; }
  std::optional<double> pattern(const model::Pattern&) override { return std::nullopt; }
  std::optional<Extremes> coincidence() override { return std::nullopt; }
  EndTable<double> ends(Basis basis) override {
    model::Chain turned = chain_;
    if (basis != Basis::analyser) {
      turned.left_end.analyser_deg = turned.right_end.analyser_deg = basis == Basis::diagonal ? 45 : 0;
    }
    return {sum_(turned)->joint};
  }

 private:
  model::Chain chain_;
  SubsetSumOf sum_;
};

Departure by_subset_sum(const std::string& arithmetic, SubsetSumOf sum) {
  Departure departure;
  departure.id = "subset-sum-" + arithmetic;
  departure.sentence = "The exact signed sum over sets of silent detectors, carried out in " + arithmetic + ".";
  departure.replaces = "exact numbers by " + arithmetic + ", subsets in binary order";
  departure.claimed = "common events; the terms cancel where heralds are rare";
  departure.source = "common practice";
  departure.touches = [](const Quantity& quantity) {
    using enum model::QuantityKind;
    return touches_probabilities(quantity) && quantity.kind != pattern_probability && quantity.kind != visibility &&
           quantity.kind != visibility_deficit;
  };
  departure.value_is_the_machine_number = true;
  departure.evaluate = [sum](const Case& point, const std::vector<Quantity>& quantities, const Setting&) {
    const auto served = sum(point.chain);
    if (!served) return declined(quantities, in_words(served.faults()));
    SubsetSums sums(point.chain, sum);
    return quantities_of(sums, point, quantities);
  };
  return departure;
}

}  // namespace

Departure subset_sum_in_binary64() { return by_subset_sum("binary64", subset_sum_binary64); }
Departure subset_sum_in_binary32() { return by_subset_sum("binary32", subset_sum_binary32); }

Departure pair_chain_in_binary32() {
  Departure departure;
  departure.id = "pair-chain-binary32";
  departure.sentence = "The chain of pair-number matrices in binary32, at most m pairs a source.";
  departure.replaces = "exact numbers by binary32 and the sum over all pair numbers by n_k <= m";
  departure.claimed = "five digits; all terms of a herald are non-negative";
  departure.source = "common practice";
  departure.setting = SettingRange{"m", "pairs kept", 1, 10, true, 6, {2, 4, 6, 8}};
  departure.touches = touches_probabilities;
  departure.value_is_the_machine_number = true;
  departure.evaluate = [](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    const auto background = [](const auto& place) { return !place.background.photons.is_zero(); };
    const model::Chain& chain = point.chain;
    if (background(chain.left_end) || background(chain.right_end) ||
        std::any_of(chain.stations.begin(), chain.stations.end(), background)) {
      return declined(quantities, "a shared background is not served");
    }
    const std::vector<long> cuts(chain.sources.size(), setting->get_num().get_si());
    return fock::values_in<float>(fock::model_description(chain, cuts), point, quantities);
  };
  return departure;
}

}  // namespace heraldgauge::compare
