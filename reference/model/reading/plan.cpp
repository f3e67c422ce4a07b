#include "reference/model/reading/plan.hpp"

#include <fmt/format.h>

namespace heraldgauge::model::reading {
namespace {

std::optional<std::size_t> station_count(const Point& point, Collector& faults) {
  const Entry* entry = point.find(Scope::chain, Field::stations);
  if (entry == nullptr) faults.add(missing(point, Scope::chain, Field::stations));
  if (entry == nullptr || entry->value == nullptr) return std::nullopt;
  return number_or_zero(entry->value).get_num().get_ui();
}

std::string range_of(std::string_view noun, std::size_t first, std::size_t last) {
  if (last < first) return fmt::format("a chain with at least one {}", noun);
  return fmt::format("{} {} to {}", noun, first, last);
}

// Addresses must name a source 0..N or a station 1..N.
void check_numbers(const Point& point, const std::map<std::size_t, Entries>& places, std::string_view noun,
                   std::size_t first, std::size_t last, Collector& faults) {
  for (const auto& [number, entries] : places) {
    if (number >= first && number <= last) continue;
    for (const Entry& entry : entries) {
      faults.add(
          Fault{point.location_of(entry), fmt::format("there is no {} {}", noun, number), range_of(noun, first, last)});
    }
  }
}

std::vector<Herald> general_heralds(const Point& point, const std::optional<std::size_t>& stations, Collector& faults) {
  const Value* value = point.value(Scope::chain, Field::herald);
  if (value == nullptr) return {Herald::psi_plus};
  if (const auto* word = std::get_if<std::string>(value)) return {herald_of(*word)};
  std::vector<Herald> heralds;
  for (const std::string& word : std::get<std::vector<std::string>>(*value)) heralds.push_back(herald_of(word));
  if (stations && heralds.size() != *stations) {
    faults.add(Fault{point.location_of(*point.find(Scope::chain, Field::herald)),
                     fmt::format("holds {} outcomes for {} stations", heralds.size(), *stations), "one a station"});
  }
  return heralds;
}

Herald general_herald(const Plan& plan, std::size_t number) {
  return plan.heralds.size() == 1 ? plan.heralds.front() : plan.heralds.at(number - 1);
}

void plan_stations(Plan& plan, const Point& point, Collector& faults) {
  const std::size_t count = plan.station_count.value_or(0);
  if (count > point.stations.size()) plan.station = plan_station(point, nullptr, faults);
  for (const auto& [number, entries] : point.stations) {
    if (number < 1 || number > count || plan.heralds.size() > count) continue;
    Station station = plan_station(point, &entries, faults);
    const Entry* herald = find(entries, Scope::station_k, Field::herald);
    const auto* word =
        herald == nullptr || herald->value == nullptr ? nullptr : std::get_if<std::string>(herald->value);
    station.herald = word != nullptr ? herald_of(*word) : general_herald(plan, number);
    plan.single_stations.emplace(number, std::move(station));
  }
}

}  // namespace

Station Plan::station_at(std::size_t number) const {
  const auto single = single_stations.find(number);
  if (single != single_stations.end()) return single->second;
  Station general = station;
  general.herald = general_herald(*this, number);
  return general;
}

Plan make_plan(const Point& point, Collector& faults) {
  Plan plan;
  plan.station_count = station_count(point, faults);
  const std::size_t count = plan.station_count.value_or(0);
  if (plan.station_count) {
    check_numbers(point, point.sources, "source", 0, count, faults);
    check_numbers(point, point.arms, "source", 0, count, faults);
    check_numbers(point, point.stations, "station", 1, count, faults);
  }
  plan.heralds = general_heralds(point, plan.station_count, faults);
  plan.sources = plan_sources(point, count, faults);
  plan.arms = plan_arms(point, count, faults);
  plan_stations(plan, point, faults);
  plan.left_end = plan_end(point, Side::left, faults);
  plan.right_end = plan_end(point, Side::right, faults);
  plan.protocol.sifting = number_or_zero(point.value(Scope::protocol, Field::sifting));
  plan.protocol.error_correction_factor = number_or_zero(point.value(Scope::protocol, Field::error_correction_factor));
  return plan;
}

Chain build_chain(const Plan& plan) {
  const std::size_t stations = *plan.station_count;
  Chain chain;
  chain.sources.assign(stations + 1, plan.sources.everywhere);
  chain.left_arms.assign(stations + 1, plan.arms.everywhere);
  chain.right_arms.assign(stations + 1, plan.arms.everywhere);
  for (const auto& [number, source] : plan.sources.single) chain.sources[number] = source;
  for (const auto& [number, arm] : plan.arms.left) chain.left_arms[number] = arm;
  for (const auto& [number, arm] : plan.arms.right) chain.right_arms[number] = arm;
  chain.stations.reserve(stations);
  for (std::size_t number = 1; number <= stations; ++number) chain.stations.push_back(plan.station_at(number));
  chain.left_end = plan.left_end;
  chain.right_end = plan.right_end;
  chain.protocol = plan.protocol;
  return chain;
}

}  // namespace heraldgauge::model::reading
