#include "reference/model/scenario.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "reference/model/reading/ask.hpp"
#include "reference/model/reading/document.hpp"
#include "reference/model/reading/items.hpp"
#include "reference/model/reading/plan.hpp"
#include "reference/model/reading/sweeps.hpp"
#include "reference/model/reading/value.hpp"

namespace heraldgauge::model {
namespace {

using namespace reading;

constexpr std::uint64_t most_points_checked = 10000;
constexpr std::uint64_t most_settings_checked = 1'000'000;  // over all points

const Item* find_item(const Items& items, Field field) {
  for (const Item& item : items.settings) {
    if (item.key->field == field) return &item;
  }
  return nullptr;
}

// Reads one document into a scenario, collecting faults.
class ScenarioReader {
 public:
  ScenarioReader(const Node& root, const std::string& source, const std::vector<Assignment>& assignments)
      : items_(collect_items(root, assignments, source, faults_)) {
    scenario_.source = source;
  }

  Expected<Scenario> read() {
    if (const Item* inputs = find_item(items_, Field::inputs)) read_inputs(*inputs);
    for (const Item& item : items_.settings) read_setting(item);
    scenario_.sweeps = read_sweeps(items_, scenario_.inputs, faults_);
    note_unread_sweeps();
    const Plan first = plan_at(0);
    read_asked(first);
    if (faults_.empty()) check_points();
    if (!faults_.empty()) return faults_.in_order();
    return std::move(scenario_);
  }

 private:
  void read_inputs(const Item& item) {
    const Expected<Value> value = read_value(*item.key, *item.node, InputMeaning::decimal, item.location);
    if (value && std::get<std::string>(*value) == "binary64") scenario_.inputs = InputMeaning::binary64;
  }

  void read_setting(const Item& item) {
    const Field field = item.key->field;
    if (field == Field::quantities || field == Field::pattern) return;
    Expected<Value> value = read_value(*item.key, *item.node, scenario_.inputs, item.location);
    if (!value) {
      faults_.add(value.faults());
      unreadable_.insert(item.name);
    } else if (field == Field::title) {
      scenario_.title = std::get<std::string>(*value);
    } else if (field != Field::inputs) {
      scenario_.settings.emplace(item.name, Setting{std::move(*value), item.location});
    }
  }

  // A sweep at fault still gives its key.
  void note_unread_sweeps() {
    for (const Node* table : items_.sweep_tables) {
      for (const Member& member : table->members) {
        if (member.key != "key" || member.value.kind != Node::Kind::text || !find_key(member.value.text)) continue;
        const std::string& key = member.value.text;
        const bool read = std::any_of(scenario_.sweeps.begin(), scenario_.sweeps.end(),
                                      [&](const Sweep& sweep) { return sweep.key == key; });
        if (!read && scenario_.settings.count(key) == 0) unreadable_.insert(key);
      }
    }
  }

  Plan plan_at(std::uint64_t index) {
    const Changes changes = scenario_.parameters_at(index);
    return make_plan(point_of(scenario_, changes, unreadable_), faults_);
  }

  void read_asked(const Plan& first) {
    const Item* pattern = find_item(items_, Field::pattern);
    if (pattern != nullptr && first.station_count) read_pattern_item(*pattern, first);
    const Item* quantities = find_item(items_, Field::quantities);
    if (quantities == nullptr) return;
    scenario_.quantities = read_quantities(*quantities, faults_);
    for (const Quantity& quantity : scenario_.quantities) {
      if (quantity.kind != QuantityKind::pattern_probability || pattern != nullptr) continue;
      faults_.add(Fault{quantities->location, "asks pattern_probability without a pattern", "ask.pattern beside it"});
    }
  }

  void read_pattern_item(const Item& item, const Plan& first) {
    const bool varying = std::any_of(scenario_.sweeps.begin(), scenario_.sweeps.end(),
                                     [](const Sweep& sweep) { return sweep.key == "chain.stations"; });
    if (varying) {
      return faults_.add(
          Fault{item.location, "stands beside a sweep of chain.stations", "a pattern for one number of stations"});
    }
    scenario_.pattern = read_pattern(item, *first.station_count, faults_);
    if (scenario_.pattern && faults_.empty()) check_counts(item, *scenario_.pattern, first, faults_);
  }

  // Values are checked one by one as they are read; what is left are faults of their combinations.
  void check_points() {
    const std::uint64_t count = scenario_.point_count();
    if (count <= most_points_checked && count * (scenario_.settings.size() + 1) <= most_settings_checked) {
      for (std::uint64_t index = 1; index < count && faults_.empty(); ++index) check_point(index);
    } else {
      check_corners();
    }
  }

  void check_point(std::uint64_t index) {
    const Plan plan = plan_at(index);
    const Item* pattern = find_item(items_, Field::pattern);
    if (pattern != nullptr && faults_.empty()) check_counts(*pattern, *scenario_.pattern, plan, faults_);
  }

  void check_corners() {
    std::vector<std::uint64_t> corners = {0};
    for (const Sweep& sweep : scenario_.sweeps) {
      std::vector<std::uint64_t> finer;
      for (const std::uint64_t corner : corners) {
        finer.push_back(corner * sweep.size());
        if (sweep.size() > 1 && finer.size() < most_points_checked) finer.push_back((corner + 1) * sweep.size() - 1);
      }
      corners = std::move(finer);
    }
    const std::uint64_t most = std::max<std::uint64_t>(1, most_settings_checked / (scenario_.settings.size() + 1));
    if (corners.size() > most) corners.resize(most);
    for (const std::uint64_t corner : corners) {
      if (faults_.empty()) check_point(corner);
    }
  }

  Collector faults_;
  Items items_;
  Scenario scenario_;
  std::set<std::string> unreadable_;
};

Expected<Chain> resolved(const Scenario& scenario, const Changes& changes) {
  Collector faults;
  const Plan plan = make_plan(point_of(scenario, changes, {}), faults);
  if (!faults.empty()) return faults.in_order();
  return build_chain(plan);
}

}  // namespace

Expected<Scenario> read_scenario(std::string_view text, const std::string& source,
                                 const std::vector<Assignment>& assignments) {
  const Expected<Node> root = parse_document(text, source);
  if (!root) return root.faults();
  return ScenarioReader(*root, source, assignments).read();
}

Expected<Chain> chain_at(const Scenario& scenario, std::uint64_t index) {
  return resolved(scenario, scenario.parameters_at(index));
}

Expected<Chain> chain_with(const Scenario& scenario, const std::vector<std::pair<std::string, Value>>& changes) {
  Collector faults;
  for (const auto& [name, value] : changes) {
    const Location location{"", 0, 0, name};
    const auto found = find_key(name);
    if (!found) {
      faults.add(unknown_key(location));
    } else if (auto wrong = wrong_value(*found->key->domain, value)) {
      faults.add(Fault{location, *wrong, allowed_values(*found->key->domain)});
    }
  }
  if (!faults.empty()) return faults.in_order();
  return resolved(scenario, changes);
}

}  // namespace heraldgauge::model
