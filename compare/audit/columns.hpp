#pragma once
// What the columns of a table mean.

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "compare/audit/known_point.hpp"
#include "reference/model/reading/keys.hpp"

namespace heraldgauge::compare {

struct ParameterColumn {
  std::size_t column;
  std::string key;
  const model::reading::Key* entry;
};

struct QuantityColumn {
  std::size_t column;
  model::Quantity quantity;
  std::optional<std::size_t> tolerance;  // its column
};

struct Columns {
  std::vector<ParameterColumn> parameters;
  std::vector<QuantityColumn> quantities;
  std::vector<std::string> warnings;  // of columns that mean nothing
};

// Names of keys or addresses set the point, names of quantities hold numbers to judge, "<quantity>.tolerance" an
// absolute tolerance. `asked` not empty: judge these only. Faults: nothing to judge, a swept key of the scenario
// without a column.
model::Expected<Columns> understand(const std::vector<std::string>& names, const model::Scenario& scenario,
                                    const std::vector<model::Quantity>& asked, const std::string& source);

// The point that a row sets: the value of each parameter column, read as the scenario reads a value in quotes.
model::Expected<Changes> changes_of(const std::vector<std::string>& cells, const Columns& columns,
                                    model::InputMeaning inputs, const std::string& place);

}  // namespace heraldgauge::compare
