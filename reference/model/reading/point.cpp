#include "reference/model/reading/point.hpp"

#include <algorithm>

namespace heraldgauge::model::reading {
namespace {

const Value* standard_of(Scope scope, Field field, InputMeaning inputs) {
  const Key& key = key_at(scope, field);
  const auto& standard = inputs == InputMeaning::binary64 ? key.standard_binary64 : key.standard;
  return standard ? &*standard : nullptr;
}

Entries& entries_for(Point& point, const FoundKey& found) {
  switch (found.key->scope) {
    case Scope::source_k:
      return point.sources[found.number];
    case Scope::arm_k_left:
    case Scope::arm_k_right:
      return point.arms[found.number];
    case Scope::station_k:
    case Scope::station_k_detector:
    case Scope::station_k_cH:
    case Scope::station_k_cV:
    case Scope::station_k_dH:
    case Scope::station_k_dV:
      return point.stations[found.number];
    default:
      return point.general;
  }
}

void add(Point& point, const std::string& name, const Value* value, const Location* location, bool changed) {
  const std::optional<FoundKey> found = find_key(name);
  if (!found) return;
  entries_for(point, *found).push_back({found->key->scope, found->key->field, value, &name, location, changed});
}

}  // namespace

Location Point::location_of(const Entry& entry) const {
  return entry.location != nullptr ? *entry.location : Location{source, 0, 0, *entry.name};
}

const Entry* find(const Entries& entries, Scope scope, Field field) {
  for (const Entry& entry : entries) {
    if (entry.scope == scope && entry.field == field) return &entry;
  }
  return nullptr;
}

const Entry* Point::find(Scope scope, Field field) const { return reading::find(general, scope, field); }

const Value* Point::value(Scope scope, Field field) const {
  const Entry* entry = find(scope, field);
  return entry != nullptr ? entry->value : standard_of(scope, field, inputs);
}

Point point_of(const Scenario& scenario, const Changes& changes, const std::set<std::string>& unreadable) {
  Point point{scenario.source, scenario.inputs, {}, {}, {}, {}};
  const auto is_changed = [&](const std::string& name) {
    return std::any_of(changes.begin(), changes.end(), [&](const auto& change) { return change.first == name; });
  };
  for (const auto& [name, setting] : scenario.settings) {
    if (!is_changed(name)) add(point, name, &setting.value, &setting.location, false);
  }
  for (const auto& [name, value] : changes) add(point, name, &value, nullptr, true);
  for (const std::string& name : unreadable) add(point, name, nullptr, nullptr, false);
  return point;
}

const Entry* entry_at(const Levels& levels, Field field) {
  for (auto level = levels.rbegin(); level != levels.rend(); ++level) {
    const Entry* entry = level->entries == nullptr ? nullptr : find(*level->entries, level->scope, field);
    if (entry != nullptr) return entry;
  }
  return nullptr;
}

const Value* value_at(const Levels& levels, Field field, InputMeaning inputs) {
  const Entry* entry = entry_at(levels, field);
  return entry != nullptr ? entry->value : standard_of(levels.front().scope, field, inputs);
}

Rational number_or_zero(const Value* value) {
  const auto* number = value == nullptr ? nullptr : std::get_if<Rational>(value);
  return number == nullptr ? Rational(0) : *number;
}

bool is_word(const Value* value, std::string_view word) {
  const auto* text = value == nullptr ? nullptr : std::get_if<std::string>(value);
  return text != nullptr && *text == word;
}

Fault missing(const Point& point, Scope scope, Field field) {
  const Key& key = key_at(scope, field);
  return Fault{{point.source, 0, 0, key.name}, "is missing", allowed_values(*key.domain)};
}

}  // namespace heraldgauge::model::reading
