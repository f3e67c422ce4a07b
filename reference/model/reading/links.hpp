#pragma once
// Sources and arms at a point of the sweeps.

#include "reference/model/reading/point.hpp"

namespace heraldgauge::model::reading {

struct SourcePlan {
  Source everywhere;
  std::map<std::size_t, Source> single;
};

struct ArmPlan {
  Arm everywhere;
  std::map<std::size_t, Arm> left, right;
};

// Faults: no form of the pair parameter for some source, two forms at one place, a form of the other kind.
SourcePlan plan_sources(const Point& point, std::size_t stations, Collector& faults);

// Faults: neither or both forms of the channel, parts of a form.
ArmPlan plan_arms(const Point& point, std::size_t stations, Collector& faults);

}  // namespace heraldgauge::model::reading
