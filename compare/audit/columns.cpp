#include "compare/audit/columns.hpp"

#include <algorithm>

#include "reference/model/reading/value.hpp"

namespace heraldgauge::compare {
namespace {

using model::Fault;
using model::Faults;
using model::Quantity;

constexpr std::string_view tolerance_suffix = ".tolerance";

std::optional<Quantity> tolerance_of(const std::string& name) {
  if (!name.ends_with(tolerance_suffix)) return std::nullopt;
  return model::find_quantity(name.substr(0, name.size() - tolerance_suffix.size()));
}

// Keys of the scenario's own questions are no parameters of a point.
bool sets_a_point(const model::reading::Key& key) {
  using model::reading::Scope;
  return key.scope != Scope::root && key.scope != Scope::ask;
}

std::string nearest_column_name(const std::string& name) {
  std::vector<std::string> names;
  for (const Quantity& quantity : model::all_quantities(true)) names.push_back(model::name_of(quantity));
  const std::string quantity = model::reading::nearest_name(name, names);
  return quantity.empty() ? model::reading::nearest_key(name) : quantity;
}

std::string unknown_column(const std::string& name, const std::string& source) {
  const std::string nearest = nearest_column_name(name);
  return source + ": the column '" + name + "' is not used: it names no key, address or quantity" +
         (nearest.empty() ? "" : "; did you mean " + nearest + "?");
}

Faults missing_columns(const Columns& columns, const model::Scenario& scenario, const std::string& source) {
  Faults faults;
  if (columns.quantities.empty()) {
    faults.push_back({{source, 1, 0, ""},
                      "no column holds numbers to judge",
                      "a column named by a quantity (heraldgauge list quantities)"});
  }
  for (const model::Sweep& sweep : scenario.sweeps) {
    const auto is_swept = [&](const ParameterColumn& column) { return column.key == sweep.key; };
    if (std::any_of(columns.parameters.begin(), columns.parameters.end(), is_swept)) continue;
    faults.push_back(
        {{source, 1, 0, sweep.key}, "the scenario sweeps it and no column has its values", "a column of that name"});
  }
  return faults;
}

}  // namespace

model::Expected<Columns> understand(const std::vector<std::string>& names, const model::Scenario& scenario,
                                    const std::vector<Quantity>& asked, const std::string& source) {
  Columns columns;
  std::vector<std::pair<Quantity, std::size_t>> tolerances;
  for (std::size_t i = 0; i < names.size(); ++i) {
    const std::string name(trimmed(names[i]));
    const auto key = model::reading::find_key(name);
    if (const auto quantity = model::find_quantity(name)) {
      const bool wanted = asked.empty() || std::find(asked.begin(), asked.end(), *quantity) != asked.end();
      if (wanted) columns.quantities.push_back({i, *quantity, std::nullopt});
    } else if (const auto judged = tolerance_of(name)) {
      tolerances.emplace_back(*judged, i);
    } else if (key && sets_a_point(*key->key)) {
      columns.parameters.push_back({i, name, key->key});
    } else {
      columns.warnings.push_back(unknown_column(name, source));
    }
  }
  for (QuantityColumn& column : columns.quantities) {
    for (const auto& [quantity, index] : tolerances) {
      if (quantity == column.quantity) column.tolerance = index;
    }
  }
  const Faults faults = missing_columns(columns, scenario, source);
  if (!faults.empty()) return faults;
  return columns;
}

model::Expected<Changes> changes_of(const std::vector<std::string>& cells, const Columns& columns,
                                    model::InputMeaning inputs, const std::string& place) {
  Changes changes;
  Faults faults;
  for (const ParameterColumn& column : columns.parameters) {
    model::reading::Node node;
    node.kind = model::reading::Node::Kind::text;
    node.text = std::string(trimmed(cells[column.column]));
    auto value = model::reading::read_value(*column.entry, node, inputs, {place, 0, 0, column.key});
    if (value) {
      changes.emplace_back(column.key, std::move(value.value()));
    } else {
      faults.insert(faults.end(), value.faults().begin(), value.faults().end());
    }
  }
  if (!faults.empty()) return faults;
  return changes;
}

}  // namespace heraldgauge::compare
