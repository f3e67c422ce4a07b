#pragma once
// The band of a curve read from print: what a quantity covers while the horizontal position moves within its reading
// tolerance.

#include <optional>
#include <string>

#include "compare/audit/known_point.hpp"

namespace heraldgauge::compare {

struct Band {
  reference::Status status = reference::Status::undefined;
  std::string reason;
  // Every number in it is a value of the quantity at some position within the tolerance: the quantity is continuous and
  // certified at the ends. Absent where the quantity is undefined at a position.
  std::optional<reference::Enclosure> attained;
  // No value within the tolerance lies outside, provided that between neighbouring positions the quantity moves no
  // further beyond their values than it moves between them.
  std::optional<reference::Enclosure> outer;
};

// `detail` (20, 40, 80 ...) sets the number of positions: 5 at 20, about twice as many at each doubling. Positions out
// of the parameter's range are moved to where the scenario allows them, or left out.
Band band_of(const Subject& subject, const Changes& changes, const model::Quantity& quantity, int detail);

}  // namespace heraldgauge::compare
