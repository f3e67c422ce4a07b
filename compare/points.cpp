#include "compare/points.hpp"

#include <set>

#include "compare/parallel.hpp"

namespace heraldgauge::compare {

std::vector<model::Quantity> quantities_to_give(const std::vector<model::Quantity>& asked,
                                                const model::Scenario& scenario, bool rational_only) {
  if (!asked.empty()) return asked;
  if (!scenario.quantities.empty()) return scenario.quantities;
  std::vector<model::Quantity> all = model::all_quantities(scenario.pattern.has_value());
  if (rational_only) std::erase_if(all, [](const model::Quantity& one) { return model::entry_of(one).irrational; });
  return all;
}

model::Expected<std::vector<model::Chain>> chains_at(const model::Scenario& scenario, std::uint64_t first,
                                                     std::size_t count, unsigned threads) {
  std::vector<model::Chain> chains(count);
  std::vector<model::Faults> faults(count);
  for_each_index(count, threads, [&](std::size_t i) {
    model::Expected<model::Chain> chain = model::chain_at(scenario, first + i);
    if (chain) {
      chains[i] = std::move(chain.value());
    } else {
      faults[i] = chain.faults();
    }
  });
  model::Faults all;
  for (const model::Faults& some : faults) all.insert(all.end(), some.begin(), some.end());
  if (!all.empty()) return distinct(all);
  return chains;
}

reports::Parameters parameters_at(const model::Scenario& scenario, std::uint64_t index) {
  reports::Parameters parameters;
  for (const auto& [key, value] : scenario.parameters_at(index)) parameters.emplace_back(key, model::value_text(value));
  return parameters;
}

model::Faults distinct(const model::Faults& faults) {
  std::set<std::string> seen;
  model::Faults kept;
  for (const model::Fault& fault : faults) {
    if (seen.insert(model::describe(fault)).second) kept.push_back(fault);
  }
  return kept;
}

}  // namespace heraldgauge::compare
