#pragma once
// One point of the sweeps, resolved: what stands everywhere, and the places that differ. Cheap to make however many
// stations there are, so that a scenario's points can be checked without building their chains.

#include "reference/model/reading/detectors.hpp"
#include "reference/model/reading/links.hpp"

namespace heraldgauge::model::reading {

struct Plan {
  std::optional<std::size_t> station_count;  // none where it is missing or unreadable, which has been reported
  SourcePlan sources;
  ArmPlan arms;
  Station station;
  std::map<std::size_t, Station> single_stations;
  std::vector<Herald> heralds;  // one for all, or one a station
  End left_end, right_end;
  Protocol protocol;

  Station station_at(std::size_t number) const;  // 1..N
};

Plan make_plan(const Point& point, Collector& faults);

// Requires a plan without faults.
Chain build_chain(const Plan& plan);

}  // namespace heraldgauge::model::reading
