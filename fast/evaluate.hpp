#pragma once
// The entry of the fast evaluator: the quantities of a chain in binary64, each with a bound on its own error. Written
// from the model alone; nothing here is shared with the reference evaluator except the chain.

#include <optional>
#include <span>
#include <string>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/fault.hpp"
#include "reference/model/pattern.hpp"
#include "reference/model/quantity.hpp"

namespace heraldgauge::fast {

// significand * 2^exponent, 0.5 <= |significand| < 1 or zero: probabilities of long chains lie far below binary64.
struct Scaled {
  double significand = 0;
  long exponent = 0;
};

enum class Status {
  computed,
  undefined,  // 0/0: no herald can occur, or no end ever clicks
  declined,   // outside what this evaluator serves; reason says what
};

struct Value {
  model::Quantity quantity;
  Status status = Status::declined;
  std::string reason;
  Scaled value;
  double relative_error_bound =
      0;  // on |computed - exact| / |exact|, round-off and cut-off together; 0 for exact values
};

// One value a quantity, in the order asked. key_fraction and key_rate bound their error relative to gain * sifting
// (times herald_probability for the rate) where that is larger than the value.
std::vector<Value> evaluate(const model::Chain& chain, const std::vector<model::Quantity>& quantities,
                            const std::optional<model::Pattern>& pattern = std::nullopt);

// The same for many chains, on `threads` threads (0: as many as the machine has). `answers` becomes the values chain by
// chain, one a quantity; whoever calls it again and again keeps its memory. They do not depend on `threads`.
void evaluate_all(std::span<const model::Chain> chains, const std::vector<model::Quantity>& quantities,
                  const std::optional<model::Pattern>& pattern, unsigned threads, std::vector<Value>& answers);

// 17 significant digits in scientific notation, correctly rounded; exponents beyond binary64 are fine.
std::string decimal(const Scaled& value);

// The nearest binary64 number; 0 or infinity beyond its range.
double to_binary64(const Scaled& value);

}  // namespace heraldgauge::fast
