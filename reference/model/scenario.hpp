#pragma once
// A scenario: settings by key, overrides by address, sweeps, and what is asked. Reading one gives exact values and
// every fault with its place; `chain_at` resolves one point of its sweeps to a Chain.

#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <variant>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/exact_number.hpp"
#include "reference/model/fault.hpp"
#include "reference/model/pattern.hpp"
#include "reference/model/quantity.hpp"

namespace heraldgauge::model {

// A setting's value as read. Numbers are exact and already rounded to binary64 where `inputs` asks for it.
using Value = std::variant<Rational, std::string, std::vector<std::string>>;

struct Setting {
  Value value;
  Location location;
};

// One swept key or address with its points in order: values one by one, or a spacing between two ends. Linear points
// are exact rationals; logarithmic points are the binary64 numbers nearest to the exact geometric points.
struct Sweep {
  enum class Spacing { listed, linear, logarithmic };
  std::string key;
  Spacing spacing = Spacing::listed;
  std::vector<Value> values;  // listed
  Rational from, to;          // linear and logarithmic
  std::uint64_t points = 0;   // linear and logarithmic: at least 2
  Location location;

  std::uint64_t size() const;
  Value value(std::uint64_t index) const;  // requires index < size()
};

// One `--set KEY=VALUE`: VALUE is a TOML value, a bare word counts as a string.
struct Assignment {
  std::string key;
  std::string value;
};

struct Scenario {
  std::string source;  // the file's name, for messages
  std::string title;
  InputMeaning inputs = InputMeaning::decimal;
  std::map<std::string, Setting> settings;  // by key or address, after --set; no sweep, no ask
  std::vector<Sweep> sweeps;                // the first varies slowest
  std::vector<Quantity> quantities;         // asked; empty: all that apply
  std::optional<Pattern> pattern;

  std::uint64_t point_count() const;  // 1 without sweeps

  // The swept keys and their values at a point (0 <= index < point_count()), in sweep order.
  std::vector<std::pair<std::string, Value>> parameters_at(std::uint64_t index) const;
};

// Reads TOML 1.0. `source` is the file name for messages ("-" for standard input). The first syntax fault alone, or
// every value fault; all points of all sweeps are resolved where that is at most 10 000 points, else the corners of the
// product.
Expected<Scenario> read_scenario(std::string_view text, const std::string& source,
                                 const std::vector<Assignment>& assignments = {});

// The chain at one point of the sweeps. Faults where values are out of range or contradict each other.
Expected<Chain> chain_at(const Scenario& scenario, std::uint64_t index);

// The chain that results when the settings of a scenario (sweeps left out) are changed by these values: what a table
// row or a search over a key needs. Keys and addresses as in the scenario.
Expected<Chain> chain_with(const Scenario& scenario, const std::vector<std::pair<std::string, Value>>& changes);

// A value as it is printed among the parameters of a result.
std::string value_text(const Value& value);

// One entry of `list keys`.
struct KeyEntry {
  std::string key;
  std::string allowed;   // unit and range, or the words that may stand
  std::string standard;  // the default; "mandatory" where there is none; "" where leaving it out means nothing
  std::string sentence;
};
const std::vector<KeyEntry>& key_registry();

}  // namespace heraldgauge::model
