#pragma once
// What is certified at one point of a table, and refined where a verdict asks for more digits.

#include <optional>
#include <string>
#include <vector>

#include "compare/audit/rule.hpp"
#include "reference/enclose.hpp"
#include "reference/model/scenario.hpp"
#include "reports/record/results.hpp"

namespace heraldgauge::compare {

using Changes = std::vector<std::pair<std::string, model::Value>>;

// One quantity at one point.
struct KnownValue {
  reference::Status status = reference::Status::undefined;
  std::string reason;
  int digits = 0;  // asked for
  std::optional<reference::Enclosure> exact;
  std::optional<reference::Enclosure> coarse;  // the same with short ends, rounded outward: quick to compare with
  reference::DecimalEnclosure shown;
};

// The capacities in force at a point, doubled: an arm carries two modes a trial. Absent where infinite.
struct DoubledCapacities {
  std::optional<reference::Enclosure> arm, chain, point;
};

struct KnownPoint {
  reports::Parameters parameters;
  Changes changes;
  std::vector<KnownValue> values;               // in the order of the quantities judged
  std::optional<DoubledCapacities> capacities;  // where a key rate is judged
};

// What is judged over the whole table.
struct Subject {
  const model::Scenario& scenario;
  std::vector<model::Quantity> quantities;
  Rule rule;
  std::optional<std::size_t> axis;  // digitised: which of the parameters lies along the horizontal axis
};

// Digits certified at first, and the most that a verdict may take.
inline constexpr int first_digits = 20;
inline constexpr int most_judging_digits = 640;

// The chain at these changes with every quantity certified to `digits`. Faults where a value is out of range or a
// quantity cannot be served. Digitised: each value is the band that the quantity covers within the reading tolerance of
// the axis.
model::Expected<KnownPoint> know(const Subject& subject, Changes changes, int digits);

// Certifies one quantity of a known point to `digits`.
void refine(const Subject& subject, KnownPoint& point, std::size_t quantity, int digits);

// An enclosure with ends of few bits, rounded outward.
reference::Enclosure rounded_outward(const reference::Enclosure& exact, int digits);

}  // namespace heraldgauge::compare
