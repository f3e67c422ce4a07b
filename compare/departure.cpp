#include "compare/departure.hpp"

#include "reference/model/exact_number.hpp"

namespace heraldgauge::compare {

using model::Expected;
using model::Quantity;
using model::QuantityKind;

Expected<Case> case_with(const model::Scenario& scenario,
                         const std::vector<std::pair<std::string, model::Value>>& changes) {
  auto chain = model::chain_with(scenario, changes);
  if (!chain) return chain.faults();
  return Case{&scenario, changes, std::move(*chain), scenario.pattern};
}

Expected<Case> case_at(const model::Scenario& scenario, std::uint64_t index) {
  return case_with(scenario, scenario.parameters_at(index));
}

std::optional<model::Rational> number_in_force(const Case& point, const std::string& key) {
  if (point.scenario == nullptr) return std::nullopt;
  for (const auto& [changed, value] : point.changes) {
    if (changed == key && std::holds_alternative<model::Rational>(value)) return std::get<model::Rational>(value);
  }
  const auto found = point.scenario->settings.find(key);
  const bool is_number =
      found != point.scenario->settings.end() && std::holds_alternative<model::Rational>(found->second.value);
  return is_number ? std::optional(std::get<model::Rational>(found->second.value)) : std::nullopt;
}

Expected<Case> case_with(const Case& point, const std::string& key, const model::Rational& number) {
  auto changes = point.changes;
  std::erase_if(changes, [&](const auto& change) { return change.first == key; });
  changes.emplace_back(key, number);
  return case_with(*point.scenario, changes);
}

Expected<Setting> checked_setting(const Departure& departure, const Setting& given) {
  const auto fault = [&](const std::string& wrong, const std::string& allowed) {
    return model::Fault{{"--shortcut", 0, 0, departure.id}, wrong, allowed};
  };
  if (!departure.setting) {
    if (given) return fault("it has no setting", "the id alone");
    return Setting{};
  }
  const SettingRange& range = *departure.setting;
  if (!given) return Setting{range.standard};
  const bool fits = *given >= range.smallest && *given <= range.largest && (!range.integer || given->get_den() == 1);
  if (fits) return given;
  return fault(range.name + " is " + model::exact_text(*given), std::string(range.integer ? "an integer" : "a number") +
                                                                    " from " + model::exact_text(range.smallest) +
                                                                    " to " + model::exact_text(range.largest));
}

bool touches_probabilities(const Quantity& quantity) { return quantity.kind < QuantityKind::capacity_point; }
bool touches_capacities(const Quantity& quantity) { return !touches_probabilities(quantity); }
bool touches_everything(const Quantity&) { return true; }
bool touches_key(const Quantity& quantity) {
  return quantity.kind == QuantityKind::key_fraction || quantity.kind == QuantityKind::key_rate;
}
bool touches_errors(const Quantity& quantity) {
  return quantity.kind == QuantityKind::qber_rectilinear || quantity.kind == QuantityKind::qber_diagonal ||
         touches_key(quantity);
}
bool touches_analyser(const Quantity& quantity) {
  return quantity.kind == QuantityKind::end_pattern || quantity.kind == QuantityKind::pattern_probability ||
         touches_visibility(quantity);
}
bool touches_visibility(const Quantity& quantity) {
  return quantity.kind == QuantityKind::visibility || quantity.kind == QuantityKind::visibility_deficit;
}

}  // namespace heraldgauge::compare
