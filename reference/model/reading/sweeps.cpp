#include "reference/model/reading/sweeps.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "reference/model/reading/value.hpp"

namespace heraldgauge::model::reading {
namespace {

constexpr std::uint64_t most_points = 10'000'000;
constexpr std::string_view allowed_members = "key with values, or with from, to, points and spacing";

bool is_swept_domain(Field field) {
  return field != Field::title && field != Field::inputs && field != Field::quantities && field != Field::pattern;
}

// Reads one [[sweep]] table.
class SweepReader {
 public:
  SweepReader(const Node& table, const Location& location, InputMeaning inputs, Collector& faults)
      : table_(table), location_(location), inputs_(inputs), faults_(faults) {}

  std::optional<Sweep> read() {
    check_members();
    const Key* key = swept_key();
    if (key == nullptr) return std::nullopt;
    const bool listed = member("values") != nullptr;
    for (const std::string_view name : {"from", "to", "points", "spacing"}) {
      if (listed && member(name) != nullptr) fault(*member(name), "stands beside values", std::string(allowed_members));
    }
    return listed ? with_values(*key) : with_range(*key);
  }

 private:
  const Member* member(std::string_view name) const {
    for (const Member& found : table_.members) {
      if (found.key == name) return &found;
    }
    return nullptr;
  }

  void fault(const Member& at, std::string wrong, std::string allowed) {
    faults_.add(Fault{place_of(at.value, location_.source, "sweep." + at.key), std::move(wrong), std::move(allowed)});
  }

  void fault(std::string_view name, std::string wrong, std::string allowed) {
    Location at = location_;
    at.key = "sweep." + std::string(name);
    faults_.add(Fault{at, std::move(wrong), std::move(allowed)});
  }

  void check_members() {
    static const std::vector<std::string> known = {"key", "values", "from", "to", "points", "spacing"};
    for (const Member& found : table_.members) {
      if (std::find(known.begin(), known.end(), found.key) != known.end()) continue;
      faults_.add(Fault{place_of(found, location_.source, "sweep." + found.key), "is an unknown key",
                        std::string(allowed_members)});
    }
  }

  const Key* swept_key() {
    const Member* key = member("key");
    if (key == nullptr) return fault("key", "is missing", "a key or address"), nullptr;
    if (key->value.kind != Node::Kind::text) {
      return fault(*key, fmt::format("is {}", description(key->value.kind)), "a key or address in quotes"), nullptr;
    }
    name_ = key->value.text;
    const auto found = find_key(name_);
    if (!found) return faults_.add(unknown_key(place_of(key->value, location_.source, name_))), nullptr;
    if (!is_swept_domain(found->key->field))
      return fault(*key, fmt::format("\"{}\" is no parameter", name_), "a key or address of the chain"), nullptr;
    return found->key;
  }

  std::optional<Sweep> with_values(const Key& key) {
    const Member& values = *member("values");
    if (values.value.kind != Node::Kind::array || values.value.items.empty()) {
      fault(values,
            values.value.kind == Node::Kind::array ? "is empty" : fmt::format("is {}", description(values.value.kind)),
            "an array of at least one value");
      return std::nullopt;
    }
    Sweep sweep = unspaced();
    bool good = true;
    for (const Node& item : values.value.items) {
      Expected<Value> value = read_value(key, item, inputs_, place_of(item, location_.source, name_));
      if (value) sweep.values.push_back(std::move(*value));
      if (!value) faults_.add(value.faults());
      good = good && value;
    }
    return good ? std::optional(sweep) : std::nullopt;
  }

  std::optional<Sweep> with_range(const Key& key) {
    if (key.domain->kind != Domain::Kind::number && key.domain->kind != Domain::Kind::integer) {
      fault("values", "is missing", "values of " + allowed_values(*key.domain));
      return std::nullopt;
    }
    const std::optional<Rational> from = end_of_range("from", key);
    const std::optional<Rational> to = end_of_range("to", key);
    const std::optional<std::uint64_t> points = point_count();
    const std::optional<Sweep::Spacing> spacing = read_spacing();
    if (!from || !to || !points || !spacing) return std::nullopt;
    Sweep sweep = unspaced();
    sweep.from = *from;
    sweep.to = *to;
    sweep.points = *points;
    sweep.spacing = *spacing;
    return has_good_points(sweep, key) ? std::optional(sweep) : std::nullopt;
  }

  Sweep unspaced() const {
    Sweep sweep;
    sweep.key = name_;
    sweep.location = location_;
    sweep.location.key = name_;
    return sweep;
  }

  std::optional<Rational> end_of_range(std::string_view name, const Key& key) {
    const Member* found = member(name);
    if (found == nullptr) return fault(name, "is missing", allowed_values(*key.domain)), std::nullopt;
    const Location at = place_of(found->value, location_.source, "sweep." + found->key);
    Expected<Value> value = read_value(key, found->value, inputs_, at);
    if (!value) return faults_.add(value.faults()), std::nullopt;
    return std::get<Rational>(*value);
  }

  std::optional<std::uint64_t> point_count() {
    const std::string allowed = fmt::format("an integer from 2 to {}", most_points);
    const Member* found = member("points");
    if (found == nullptr) return fault("points", "is missing", allowed), std::nullopt;
    if (found->value.kind != Node::Kind::number) {
      return fault(*found, fmt::format("is {}", description(found->value.kind)), allowed), std::nullopt;
    }
    const Expected<Rational> points = read_number(found->value, InputMeaning::decimal, {});
    if (!points || points->get_den() != 1 || *points < 2 || *points > most_points) {
      return fault(*found, fmt::format("is {}", found->value.text), allowed), std::nullopt;
    }
    return points->get_num().get_ui();
  }

  std::optional<Sweep::Spacing> read_spacing() {
    const Member* found = member("spacing");
    if (found == nullptr || (found->value.kind == Node::Kind::text && found->value.text == "linear"))
      return Sweep::Spacing::linear;
    if (found->value.kind == Node::Kind::text && found->value.text == "log") return Sweep::Spacing::logarithmic;
    fault(*found,
          found->value.kind == Node::Kind::text ? "is an unknown word"
                                                : fmt::format("is {}", description(found->value.kind)),
          "\"linear\" or \"log\"");
    return std::nullopt;
  }

  bool has_good_points(const Sweep& sweep, const Key& key) {
    if (sweep.from == sweep.to) return fault(*member("to"), "equals from", "two different ends, or values"), false;
    if (sweep.spacing == Sweep::Spacing::logarithmic) {
      const auto fits = [](const Rational& x) {
        const Expected<Rational> rounded = nearest_binary64(x);
        return rounded && *rounded > 0;
      };
      if (!fits(sweep.from) || !fits(sweep.to)) {
        return fault(*member("spacing"), "needs ends above 0 in the range of binary64", "such ends, or \"linear\""),
               false;
      }
    }
    return key.domain->kind != Domain::Kind::integer || has_integer_points(sweep);
  }

  bool has_integer_points(const Sweep& sweep) {
    for (std::uint64_t index = 0; index < sweep.size(); ++index) {
      const Value value = sweep.value(index);
      const Rational& x = std::get<Rational>(value);
      if (x.get_den() == 1) continue;
      return fault(*member("points"), fmt::format("gives {}, no integer", exact_text(x)), "points that are integers"),
             false;
    }
    return true;
  }

  const Node& table_;
  const Location& location_;
  InputMeaning inputs_;
  Collector& faults_;
  std::string name_;
};

// Whether a sweep's key is neither swept before nor set by `--set`.
bool is_free(const Sweep& sweep, const std::vector<Sweep>& before, const Items& items, Collector& faults) {
  for (const Item& item : items.settings) {
    if (item.name == sweep.key && item.location.source == "--set") {
      faults.add(Fault{item.location, "is a swept key", "keys that no [[sweep]] names"});
      return false;
    }
  }
  for (const Sweep& other : before) {
    if (other.key == sweep.key) {
      faults.add(Fault{sweep.location, "is swept twice", "one [[sweep]] a key"});
      return false;
    }
  }
  return true;
}

}  // namespace

std::vector<Sweep> read_sweeps(const Items& items, InputMeaning inputs, Collector& faults) {
  std::vector<Sweep> sweeps;
  std::uint64_t product = 1;
  for (std::size_t index = 0; index < items.sweep_tables.size(); ++index) {
    auto sweep = SweepReader(*items.sweep_tables[index], items.sweep_places[index], inputs, faults).read();
    if (!sweep || !is_free(*sweep, sweeps, items, faults)) continue;
    if (sweep->size() > most_points / product) {
      faults.add(
          Fault{sweep->location, "makes the sweeps more than 10000000 points together", "at most 10000000 points"});
      continue;
    }
    product *= sweep->size();
    sweeps.push_back(std::move(*sweep));
  }
  return sweeps;
}

}  // namespace heraldgauge::model::reading
