#include "compare/chosen.hpp"

#include "compare/registry.hpp"
#include "reference/model/exact_number.hpp"
#include "reference/model/reading/keys.hpp"

namespace heraldgauge::compare {
namespace {

using model::Expected;
using model::Fault;

Fault unknown(const std::string& id) {
  std::vector<std::string> names;
  for (const auto* registry : {&shortcuts(), &conventions()}) {
    for (const Departure& departure : *registry) names.push_back(departure.id);
  }
  const std::string nearest = model::reading::nearest_name(id, names);
  return {{"--shortcut", 0, 0, ""},
          "'" + id + "' is no shortcut" + (nearest.empty() ? "" : "; did you mean " + nearest + "?"),
          "an id from heraldgauge list shortcuts"};
}

Expected<Chosen> chosen(const std::string& text) {
  const std::size_t equals = text.find('=');
  const std::string id = text.substr(0, equals);
  const Departure* departure = find_departure(id);
  if (departure == nullptr) return unknown(id);
  Setting given;
  if (equals != std::string::npos) {
    const auto number = model::parse_exact(text.substr(equals + 1));
    if (!number) return Fault{{"--shortcut", 0, 0, id}, "'" + text.substr(equals + 1) + "' is no number", "ID=NUMBER"};
    given = *number;
  }
  const auto setting = checked_setting(*departure, given);
  if (!setting) return setting.faults();
  return Chosen{departure, *setting};
}

}  // namespace

Expected<std::vector<Chosen>> chosen_shortcuts(const std::vector<std::string>& texts) {
  std::vector<Chosen> all;
  model::Faults faults;
  for (const std::string& text : texts) {
    const auto one = chosen(text);
    if (one) {
      all.push_back(*one);
    } else {
      faults.insert(faults.end(), one.faults().begin(), one.faults().end());
    }
  }
  if (!faults.empty()) return faults;
  if (texts.empty()) {
    for (const Departure& departure : shortcuts()) all.push_back({&departure, *checked_setting(departure, {})});
  }
  return all;
}

std::optional<std::string> setting_text(const Setting& setting) {
  return setting ? std::optional<std::string>(model::exact_text(*setting)) : std::nullopt;
}

}  // namespace heraldgauge::compare
