#include "reference/model/reading/ask.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "reference/model/reading/value.hpp"

namespace heraldgauge::model::reading {
namespace {

constexpr std::size_t station_detectors = 4;
constexpr std::size_t end_detectors = 2;
constexpr std::size_t most_count_digits = 6;

std::string nearest_quantity(const std::string& name) {
  constexpr std::size_t longest_name = 40;
  if (name.size() > longest_name) return "";
  std::vector<std::string> names;
  for (const Quantity& quantity : all_quantities(true)) names.push_back(name_of(quantity));
  return nearest_name(name, names);
}

std::optional<Ask> read_ask(const std::string& text) {
  if (text == "1") return Ask{Ask::Kind::clicks};
  if (text == "0") return Ask{Ask::Kind::silent};
  if (text == "*") return Ask{Ask::Kind::not_looked_at};
  const std::string digits = text.starts_with("n") ? text.substr(1) : "";
  const bool count = !digits.empty() && digits.size() <= most_count_digits &&
                     digits.find_first_not_of("0123456789") == std::string::npos;
  return count ? std::optional(Ask{Ask::Kind::counts, std::stoi(digits)}) : std::nullopt;
}

// Reads the parts of one pattern.
class PatternReader {
 public:
  PatternReader(const Item& item, Collector& faults) : item_(item), faults_(faults) {}

  std::optional<Pattern> read(std::size_t stations) {
    Pattern pattern;
    pattern.stations.resize(stations);
    if (item_.node->kind == Node::Kind::array) {
      read_whole(pattern);
    } else if (item_.node->kind == Node::Kind::table) {
      read_parts(pattern);
    } else {
      fault(*item_.node, fmt::format("is {}", description(item_.node->kind)));
    }
    return good_ ? std::optional(pattern) : std::nullopt;
  }

 private:
  void fault(const Node& at, std::string wrong) {
    good_ = false;
    Location location = item_.location;
    if (location.line > 0) location = place_of(at, location.source, location.key);
    faults_.add(Fault{location, std::move(wrong), allowed_values(*item_.key->domain)});
  }

  void read_parts(Pattern& pattern) {
    for (const Member& member : item_.node->members) {
      if (member.key == "stations") {
        read_stations(member.value, pattern);
      } else if (member.key == "left") {
        read_detectors(member.value, pattern.left);
      } else if (member.key == "right") {
        read_detectors(member.value, pattern.right);
      } else {
        fault(member.value, fmt::format("holds the unknown part {}", member.key));
      }
    }
  }

  void read_stations(const Node& node, Pattern& pattern) {
    const std::size_t count = node.items.size();
    if (node.kind != Node::Kind::array) return fault(node, fmt::format("stations is {}", description(node.kind)));
    if (count != pattern.stations.size()) {
      return fault(node, fmt::format("names {} of {} stations", count, pattern.stations.size()));
    }
    for (std::size_t index = 0; index < count; ++index) read_detectors(node.items[index], pattern.stations[index]);
  }

  void read_whole(Pattern& pattern) {
    const std::vector<std::string> texts = texts_of(*item_.node);
    const std::size_t wanted = station_detectors * pattern.stations.size() + 2 * end_detectors;
    if (good_ && texts.size() != wanted) {
      fault(*item_.node, fmt::format("names {} of {} detectors", texts.size(), wanted));
    }
    if (!good_) return;
    auto next = texts.begin();
    for (auto& station : pattern.stations) assign(*item_.node, next, station);
    assign(*item_.node, next, pattern.left);
    assign(*item_.node, next, pattern.right);
  }

  template <std::size_t Count>
  void read_detectors(const Node& node, std::array<Ask, Count>& asks) {
    const std::vector<std::string> texts = texts_of(node);
    if (!good_) return;
    if (texts.size() != Count) return fault(node, fmt::format("names {} of {} detectors", texts.size(), Count));
    auto next = texts.begin();
    assign(node, next, asks);
  }

  // One text a detector: the letters of a text, or the items of an array.
  std::vector<std::string> texts_of(const Node& node) {
    std::vector<std::string> texts;
    if (node.kind == Node::Kind::text) {
      for (const char letter : node.text) texts.push_back(std::string(1, letter));
    } else if (node.kind == Node::Kind::array) {
      for (const Node& item : node.items) {
        if (item.kind != Node::Kind::text) fault(item, fmt::format("holds {}", description(item.kind)));
        texts.push_back(item.text);
      }
    } else {
      fault(node, fmt::format("holds {}", description(node.kind)));
    }
    return texts;
  }

  template <std::size_t Count>
  void assign(const Node& node, std::vector<std::string>::const_iterator& next, std::array<Ask, Count>& asks) {
    for (Ask& ask : asks) {
      const std::string& text = *next++;
      const std::optional<Ask> read = read_ask(text);
      if (read) ask = *read;
      if (!read) fault(node, fmt::format("holds \"{}\"", text.substr(0, 10)));
    }
  }

  const Item& item_;
  Collector& faults_;
  bool good_ = true;
};

template <std::size_t Count>
bool counts_without_resolving(const std::array<Ask, Count>& asks, const std::array<Detector, Count>& detectors) {
  for (std::size_t index = 0; index < Count; ++index) {
    if (asks[index].kind == Ask::Kind::counts && detectors[index].kind != DetectorKind::resolving) return true;
  }
  return false;
}

}  // namespace

std::vector<Quantity> read_quantities(const Item& item, Collector& faults) {
  const Node& node = *item.node;
  std::vector<Quantity> quantities;
  const std::string allowed = allowed_values(*item.key->domain) + ", of `heraldgauge list quantities`";
  const auto add = [&](const Node& name) {
    const Location at = item.location.line > 0 ? place_of(name, item.location.source, item.name) : item.location;
    const auto quantity = name.kind == Node::Kind::text ? find_quantity(name.text) : std::nullopt;
    const std::string nearest = name.kind == Node::Kind::text ? nearest_quantity(name.text) : "";
    if (name.kind != Node::Kind::text) {
      faults.add(Fault{at, fmt::format("holds {}", description(name.kind)), allowed});
    } else if (!quantity) {
      faults.add(Fault{at, fmt::format("\"{}\" is an unknown quantity", name.text.substr(0, 40)),
                       nearest.empty() ? allowed : allowed + ", such as " + nearest});
    } else if (std::find(quantities.begin(), quantities.end(), *quantity) != quantities.end()) {
      faults.add(Fault{at, fmt::format("\"{}\" is asked twice", name.text), "each quantity once"});
    } else {
      quantities.push_back(*quantity);
    }
  };
  if (node.kind == Node::Kind::text) add(node);
  for (const Node& name : node.items) add(name);
  if (node.kind != Node::Kind::text && node.kind != Node::Kind::array) {
    faults.add(Fault{item.location, fmt::format("is {}", description(node.kind)), allowed});
  }
  return quantities;
}

std::optional<Pattern> read_pattern(const Item& item, std::size_t stations, Collector& faults) {
  return PatternReader(item, faults).read(stations);
}

void check_counts(const Item& item, const Pattern& pattern, const Plan& plan, Collector& faults) {
  bool bad = counts_without_resolving(pattern.left, plan.left_end.detectors) ||
             counts_without_resolving(pattern.right, plan.right_end.detectors);
  for (std::size_t index = 0; index < pattern.stations.size() && !bad; ++index) {
    bad = counts_without_resolving(pattern.stations[index], plan.station_at(index + 1).detectors);
  }
  if (bad) {
    faults.add(Fault{item.location, "counts photons at a threshold detector",
                     "1, 0 or *, or detectors of kind \"resolving\""});
  }
}

}  // namespace heraldgauge::model::reading
