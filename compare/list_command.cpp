#include "compare/list_command.hpp"

#include "compare/registry.hpp"
#include "reference/model/quantity.hpp"
#include "reference/model/scenario.hpp"

namespace heraldgauge::compare {
namespace {

std::string sense_text(model::Sense sense) {
  switch (sense) {
    case model::Sense::more_is_better:
      return "more is better";
    case model::Sense::less_is_better:
      return "less is better";
    case model::Sense::neutral:
      break;
  }
  return "neutral";
}

reports::ListReport quantities() {
  reports::ListReport report{"quantities", {}};
  for (const model::QuantityEntry& entry : model::quantity_registry()) {
    report.entries.push_back({std::string(entry.name),
                              std::string(entry.sentence),
                              {{"sense", sense_text(entry.sense)}, {"exact", entry.irrational ? "no" : "yes"}}});
  }
  return report;
}

reports::ListReport departures(const std::string& what, const std::vector<Departure>& all) {
  reports::ListReport report{what, {}};
  for (const Departure& one : all) {
    report.entries.push_back(
        {one.id, one.sentence, {{"replaces", one.replaces}, {"claimed", one.claimed}, {"source", one.source}}});
  }
  return report;
}

reports::ListReport keys() {
  reports::ListReport report{"keys", {}};
  for (const model::KeyEntry& entry : model::key_registry()) {
    report.entries.push_back({entry.key, entry.sentence, {{"allowed", entry.allowed}, {"default", entry.standard}}});
  }
  return report;
}

}  // namespace

std::optional<ListSubject> find_list_subject(std::string_view name) {
  if (name == "quantities") return ListSubject::quantities;
  if (name == "shortcuts") return ListSubject::shortcuts;
  if (name == "conventions") return ListSubject::conventions;
  if (name == "keys") return ListSubject::keys;
  return std::nullopt;
}

reports::ListReport list_command(ListSubject subject) {
  switch (subject) {
    case ListSubject::shortcuts:
      return departures("shortcuts", shortcuts());
    case ListSubject::conventions:
      return departures("conventions", conventions());
    case ListSubject::keys:
      return keys();
    case ListSubject::quantities:
      break;
  }
  return quantities();
}

}  // namespace heraldgauge::compare
