#pragma once
// Stations and ends at a point of the sweeps: per-detector settings beat per-place ones, which beat general ones.

#include "reference/model/reading/point.hpp"

namespace heraldgauge::model::reading {

// Station K with the settings of its own, or what stands everywhere where `own` is null. Faults: no efficiency, two
// forms of the dark probability at one place, half of the dark law, a law that reaches 1.
Station plan_station(const Point& point, const Entries* own, Collector& faults);

enum class Side { left, right };
End plan_end(const Point& point, Side side, Collector& faults);

Herald herald_of(std::string_view word);

}  // namespace heraldgauge::model::reading
