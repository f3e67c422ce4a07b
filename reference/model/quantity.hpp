#pragma once
// The registry of quantities: one entry each, from which the commands, `list quantities` and the scenario reader take
// their names. The formulas live in the evaluators.

#include <compare>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace heraldgauge::model {

enum class QuantityKind {
  herald_probability,
  pattern_probability,
  trials_per_herald,
  end_pattern,
  gain,
  qber_rectilinear,
  qber_diagonal,
  visibility,
  visibility_deficit,
  key_fraction,
  key_rate,
  capacity_point,
  capacity_loose,
  capacity_chain,
  capacity_arm,
};

// What a larger value means to somebody who wants a key.
enum class Sense { more_is_better, less_is_better, neutral };

// One quantity. `end_pattern` stands for 16 of them: `outcome` holds the four bits left plus, left cross, right plus,
// right cross, the first as the highest bit; 0 for every other kind.
struct Quantity {
  QuantityKind kind;
  int outcome = 0;
  friend auto operator<=>(const Quantity&, const Quantity&) = default;
};

struct QuantityEntry {
  QuantityKind kind;
  std::string_view name;  // of the family, for end_pattern: "end_pattern_abcd"
  std::string_view sentence;
  Sense sense;
  bool irrational;  // not a rational function of the inputs, so `--exact` cannot serve it
};

const std::vector<QuantityEntry>& quantity_registry();
const QuantityEntry& entry_of(const Quantity& quantity);

// "end_pattern_1001", "key_rate".
std::string name_of(const Quantity& quantity);
std::optional<Quantity> find_quantity(std::string_view name);

// Every quantity, the 16 end patterns one by one, in registry order; pattern_probability only where a pattern is
// stated.
std::vector<Quantity> all_quantities(bool with_pattern);

}  // namespace heraldgauge::model
