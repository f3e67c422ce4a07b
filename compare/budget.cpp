#include "compare/budget.hpp"

#include "reference/model/reading/value.hpp"

namespace heraldgauge::compare {
namespace {

using model::Fault;
using model::Faults;
using model::reading::Member;
using model::reading::Node;
using model::reading::place_of;

constexpr const char* limits_allowed = "{ relative = R, absolute = A }, one or both";
constexpr const char* names_allowed = "a name from heraldgauge list quantities, or any";

class Reader {
 public:
  explicit Reader(const std::string& source) : source_(source) {}

  Budget read(const Node& root) {
    Budget budget;
    for (const Member& member : root.members) {
      if (member.key != "shortcuts") {
        read_quantity(member, budget.all);
      } else if (is_table(member)) {
        for (const Member& shortcut : member.value.members) read_shortcut(shortcut, budget.shortcuts[shortcut.key]);
      }
    }
    return budget;
  }
  const Faults& faults() const { return faults_; }

 private:
  void refuse(const Member& member, const std::string& wrong, const std::string& allowed) {
    faults_.push_back({place_of(member, source_, member.key), wrong, allowed});
  }

  bool is_table(const Member& member) {
    if (member.value.kind == Node::Kind::table) return true;
    refuse(member, "is no table", "[shortcuts.ID] with one table a quantity");
    return false;
  }

  void read_shortcut(const Member& shortcut, Limits& limits) {
    if (!is_table(shortcut)) return;
    for (const Member& member : shortcut.value.members) read_quantity(member, limits);
  }

  void read_quantity(const Member& member, Limits& limits) {
    const auto quantity = model::find_quantity(member.key);
    if (member.key == "any") {
      limits.any = read_limits(member);
    } else if (quantity) {
      limits.named[*quantity] = read_limits(member);
    } else {
      refuse(member, "is no quantity", names_allowed);
    }
  }

  Limit read_limits(const Member& member) {
    Limit limit;
    if (member.value.kind != Node::Kind::table || member.value.members.empty()) {
      refuse(member, "is no limit", limits_allowed);
      return limit;
    }
    for (const Member& one : member.value.members) read_limit(one, limit);
    return limit;
  }

  void read_limit(const Member& member, Limit& limit) {
    const bool relative = member.key == "relative";
    if (!relative && member.key != "absolute") return refuse(member, "is no limit", limits_allowed);
    const auto number =
        model::reading::read_number(member.value, model::InputMeaning::decimal, place_of(member, source_, member.key));
    if (!number) {
      faults_.insert(faults_.end(), number.faults().begin(), number.faults().end());
    } else if (*number < 0 || (relative && *number >= 1)) {
      refuse(member, "is out of range", relative ? "a number from 0 to below 1" : "0 or more");
    } else {
      (relative ? limit.relative : limit.absolute) = *number;
    }
  }

  const std::string& source_;
  Faults faults_;
};

}  // namespace

std::optional<Limit> Limits::limit(const model::Quantity& quantity) const {
  const auto found = named.find(quantity);
  return found != named.end() ? std::optional(found->second) : any;
}

std::optional<Limit> Budget::limit(const model::Quantity& quantity, const std::string& shortcut) const {
  const auto found = shortcuts.find(shortcut);
  if (found != shortcuts.end()) {
    if (const auto own = found->second.limit(quantity)) return own;
  }
  return all.limit(quantity);
}

model::Expected<Budget> read_budget(std::string_view text, const std::string& source) {
  const model::Expected<Node> root = model::reading::parse_document(text, source);
  if (!root) return root.faults();
  Reader reader(source);
  Budget budget = reader.read(*root);
  if (!reader.faults().empty()) return reader.faults();
  return budget;
}

}  // namespace heraldgauge::compare
