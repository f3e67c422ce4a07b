#pragma once
// The quantities in binary64 from any binary64 probabilities: what a program does with the table that it computed,
// right or not. The formulas are those of the model.

#include <memory>

#include "compare/departure.hpp"
#include "reference/route.hpp"

namespace heraldgauge::compare {

// Joint probabilities of the herald and what the ends see, per trial.
class Probabilities64 {
 public:
  virtual ~Probabilities64() = default;
  virtual double herald() = 0;
  virtual reference::EndTable<double> ends(reference::Basis basis) = 0;
  virtual std::optional<double> pattern(const model::Pattern& pattern) = 0;
  // Smallest and largest coincidence (both plus click, both cross silent) over the right analyser angle; none where
  // this source of probabilities does not offer it.
  struct Extremes {
    double smallest, largest;
  };
  virtual std::optional<Extremes> coincidence() = 0;
};

// Capacities come from the binary64 evaluator. Declined: what the probabilities do not offer, and error rates outside
// [0,1] where a key fraction would need their entropy.
std::vector<Value> quantities_of(Probabilities64& probabilities, const Case& point,
                                 const std::vector<model::Quantity>& quantities);

// x as significand and exponent; x must be finite.
fast::Scaled scaled(double x);

}  // namespace heraldgauge::compare
