#pragma once
// The settings in force at one point of the sweeps, sorted by place.

#include <array>
#include <map>
#include <set>

#include "reference/model/reading/items.hpp"

namespace heraldgauge::model::reading {

using Changes = std::vector<std::pair<std::string, Value>>;

// One setting. `value` is null where it was given but could not be read: a fault has been reported, and it is neither
// missing nor to be judged further.
struct Entry {
  Scope scope;
  Field field;
  const Value* value;
  const std::string* name;
  const Location* location;  // null for a change
  bool changed;
};
using Entries = std::vector<Entry>;

struct Point {
  std::string source;
  InputMeaning inputs = InputMeaning::decimal;
  Entries general;  // without a number K
  std::map<std::size_t, Entries> sources, arms, stations;

  Location location_of(const Entry& entry) const;
  const Entry* find(Scope scope, Field field) const;

  // The value of a key without number: as set, else its default, else null.
  const Value* value(Scope scope, Field field) const;
};

// `changes` beat settings of the same key. Scenario, changes and unreadable names must outlive the result.
Point point_of(const Scenario& scenario, const Changes& changes, const std::set<std::string>& unreadable);

const Entry* find(const Entries& entries, Scope scope, Field field);

// Places from the most general to the most specific at which one field may be set. Empty levels have null entries.
struct Level {
  const Entries* entries = nullptr;
  Scope scope = Scope::root;
};
using Levels = std::array<Level, 3>;

// The most specific value, else the default of the most general key, else null.
const Value* value_at(const Levels& levels, Field field, InputMeaning inputs);
const Entry* entry_at(const Levels& levels, Field field);

// The value as a number; 0 where it is missing or unreadable, which has been reported.
Rational number_or_zero(const Value* value);
bool is_word(const Value* value, std::string_view word);

// The fault of a mandatory key that is missing.
Fault missing(const Point& point, Scope scope, Field field);

}  // namespace heraldgauge::model::reading
