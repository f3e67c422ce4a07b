#pragma once
// The numbers of a table as the search for causes sees them: scaled binary64, each in its own power of two, so that
// probabilities far below binary64 are compared like any others.

#include <cstddef>
#include <optional>
#include <vector>

#include "compare/audit/sample.hpp"
#include "compare/departure.hpp"

namespace heraldgauge::compare {

struct Target {
  std::size_t point = 0;     // index into cases
  std::size_t quantity = 0;  // index into quantities
  long exponent = 0;         // the numbers below are in units of 2^exponent
  double given = 0;
  double below = 0, above = 0;  // what is accepted: [given - below, given + above]
  double exact = 0;
  bool wrong = false;
};

struct Data {
  std::vector<model::Quantity> quantities;
  std::vector<Case> cases;      // each distinct point once
  std::vector<Target> targets;  // in the order of the table
  std::size_t wrong_count = 0;
};

// What a cause would have made of each target, in the target's unit; nothing where it says nothing.
using Prediction = std::vector<std::optional<double>>;

// Tolerances are taken no narrower than this part of the number: causes are tried in binary64.
inline constexpr double evaluation_floor = 1e-12;

Data data_of(const std::vector<Datum>& data, const Subject& subject);

// A value of the binary64 evaluator in a target's unit; infinite where it is out of range.
double in_unit_of(const Target& target, const fast::Scaled& value);

// Distance of a prediction from the number given, in tolerances: at most 1 where it is accepted.
double distance(const Target& target, double prediction);

struct Score {
  std::size_t explained = 0;        // targets that the prediction gives within their tolerances
  std::size_t wrong_explained = 0;  // those among them that differ from the exact value
  std::size_t right_broken = 0;     // numbers that agree with the exact value, but not with the prediction
  double residual = 0;              // root mean square distance, each capped
};
Score score(const Data& data, const Prediction& prediction);

// The exact values as a prediction: what no cause at all would give.
Prediction exact_prediction(const Data& data);

}  // namespace heraldgauge::compare
