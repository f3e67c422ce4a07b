// Until the binary64 kernel lands: every quantity is declined, by name.

#include "fast/evaluate.hpp"

namespace heraldgauge::fast {

std::string decimal(const Scaled&) { return "0.0000000000000000e+00"; }

std::vector<Value> evaluate(const model::Chain&, const std::vector<model::Quantity>& quantities,
                            const std::optional<model::Pattern>&) {
  std::vector<Value> values;
  for (const model::Quantity& quantity : quantities) {
    values.push_back({quantity, Status::declined, "the binary64 evaluator is not part of this build", {}, 0});
  }
  return values;
}

std::vector<std::vector<Value>> evaluate_all(std::span<const model::Chain> chains,
                                             const std::vector<model::Quantity>& quantities,
                                             const std::optional<model::Pattern>& pattern, unsigned) {
  std::vector<std::vector<Value>> values;
  for (const model::Chain& chain : chains) values.push_back(evaluate(chain, quantities, pattern));
  return values;
}

}  // namespace heraldgauge::fast
