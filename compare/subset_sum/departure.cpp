#include "compare/subset_sum/departure.hpp"

#include "compare/other_chain.hpp"
#include "compare/quantities_binary64.hpp"

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

}  // namespace

Departure by_subset_sum(Departure departure, SubsetSumOf sum) {
  departure.touches = [](const Quantity& quantity) {
    return touches_probabilities(quantity) && !touches_visibility(quantity) &&
           quantity.kind != model::QuantityKind::pattern_probability;
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

}  // namespace heraldgauge::compare
