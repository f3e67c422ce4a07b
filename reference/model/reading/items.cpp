#include "reference/model/reading/items.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <map>
#include <tuple>

#include "reference/model/reading/value.hpp"

namespace heraldgauge::model::reading {
namespace {

constexpr std::string_view how_to_list = "a key or address of `heraldgauge list keys`";

class Walk {
 public:
  Walk(const std::string& source, Items& items, Collector& faults) : source_(source), items_(items), faults_(faults) {}

  void root(const Node& table) {
    for (const Member& member : table.members) {
      if (member.key == "override") {
        overrides(member);
      } else if (member.key == "sweep") {
        sweeps(member);
      } else {
        entry(member, "", false);
      }
    }
  }

 private:
  void overrides(const Member& member) {
    if (member.value.kind == Node::Kind::table) return table(member.value, "", true);
    faults_.add(Fault{place_of(member, source_, "override"), fmt::format("is {}", description(member.value.kind)),
                      "a table with addresses as keys"});
  }

  void sweeps(const Member& member) {
    const bool tables = member.value.kind == Node::Kind::array &&
                        std::all_of(member.value.items.begin(), member.value.items.end(),
                                    [](const Node& item) { return item.kind == Node::Kind::table; });
    if (!tables) {
      faults_.add(
          Fault{place_of(member, source_, "sweep"), "is no array of tables", "one [[sweep]] table a swept key"});
      return;
    }
    for (const Node& item : member.value.items) {
      items_.sweep_tables.push_back(&item);
      items_.sweep_places.push_back(place_of(item, source_, "sweep"));
    }
  }

  void table(const Node& node, const std::string& prefix, bool under_override) {
    for (const Member& member : node.members) entry(member, prefix, under_override);
  }

  void entry(const Member& member, const std::string& prefix, bool under_override) {
    const std::string name = prefix + member.key;
    if (const auto found = find_key(name)) return setting(member, name, *found->key, under_override);
    if (member.value.kind == Node::Kind::table && (!member.value.members.empty() || is_scope(name))) {
      return table(member.value, name + ".", under_override);
    }
    unknown(place_of(member, source_, name));
  }

  // Looking for the nearest name takes its time, so a text full of unknown keys gets that help for the first ones only.
  void unknown(const Location& location) {
    constexpr int most_suggestions = 100;
    faults_.add(++unknown_ <= most_suggestions ? unknown_key(location)
                                               : Fault{location, "is an unknown key", std::string(how_to_list)});
  }

  void setting(const Member& member, const std::string& name, const Key& key, bool under_override) {
    const Location key_place = place_of(member, source_, name);
    if (key.address && !under_override) {
      return faults_.add(Fault{key_place, "is an address outside [override]", "addresses under [override]"});
    }
    if (!key.address && under_override) {
      return faults_.add(Fault{key_place, "names no single place", "an address under [override], this key outside it"});
    }
    if (!names_.insert(name).second) return faults_.add(Fault{key_place, "is given twice", "each key once"});
    items_.settings.push_back({name, &key, &member.value, place_of(member.value, source_, name)});
  }

  const std::string& source_;
  Items& items_;
  Collector& faults_;
  std::set<std::string> names_;
  int unknown_ = 0;
};

std::optional<Item> assigned_item(const Assignment& assignment, Items& items, Collector& faults) {
  const Location location{"--set", 0, 0, assignment.key};
  const auto found = find_key(assignment.key);
  if (!found) {
    faults.add(unknown_key(location));
    return std::nullopt;
  }
  Expected<Node> node = parse_value(assignment.value, "--set");
  if (!node) {
    Fault fault = node.faults().front();
    fault.location = location;
    faults.add(fault);
    return std::nullopt;
  }
  items.assigned.push_back(std::move(*node));
  return Item{assignment.key, found->key, &items.assigned.back(), location};
}

}  // namespace

void Collector::add(Fault fault) {
  const Location& at = fault.location;
  const std::string identity = fmt::format("{}:{}:{}:{}:{}", at.source, at.line, at.column, at.key, fault.wrong);
  if (seen_.insert(identity).second) faults_.push_back(std::move(fault));
}

void Collector::add(const Faults& faults) {
  for (const Fault& fault : faults) add(fault);
}

Faults Collector::in_order() const {
  Faults sorted = faults_;
  std::stable_sort(sorted.begin(), sorted.end(), [](const Fault& a, const Fault& b) {
    const auto rank = [](const Location& at) { return std::tuple(at.line == 0, at.line, at.column); };
    return rank(a.location) < rank(b.location);
  });
  return sorted;
}

Fault unknown_key(const Location& location) {
  const std::string nearest = nearest_key(location.key);
  return Fault{location, "is an unknown key",
               nearest.empty() ? std::string(how_to_list) : fmt::format("{}, such as {}", how_to_list, nearest)};
}

Items collect_items(const Node& root, const std::vector<Assignment>& assignments, const std::string& source,
                    Collector& faults) {
  Items items;
  Walk(source, items, faults).root(root);
  std::map<std::string, Item> assigned;
  for (const Assignment& assignment : assignments) {
    std::optional<Item> item = assigned_item(assignment, items, faults);
    if (item && !assigned.emplace(item->name, *item).second) {
      faults.add(Fault{item->location, "is set twice", "each key once"});
    }
  }
  std::erase_if(items.settings, [&](const Item& item) { return assigned.count(item.name) > 0; });
  for (auto& [name, item] : assigned) items.settings.push_back(item);
  return items;
}

}  // namespace heraldgauge::model::reading
