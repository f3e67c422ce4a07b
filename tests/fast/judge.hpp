#pragma once
// Fast values against certified enclosures of the same chain.

#include <string>
#include <vector>

#include "fast/evaluate.hpp"
#include "reference/enclose.hpp"

namespace heraldgauge::test {

// How one fast value compares with its enclosure.
struct Judgement {
  enum class Kind {
    compared,        // error and bound are set
    both_undefined,  // 0/0 on both sides
    declined,        // the fast evaluator says that it does not serve this; text says why
    undecided,       // the reference found no bounded enclosure; text says why
    contradicted,    // undefined on one side only
  };
  model::Quantity quantity;
  Kind kind = Kind::contradicted;
  std::string text;
  double error = 0;          // distance from the enclosure over max(its upper end, the scale of the quantity); 0 inside
  double bound = 0;          // the value's own bound on that
  bool zero_missed = false;  // the exact value may be 0, and the computed one is outside the enclosure
  std::string value;         // as decimals, for messages
};

// One judgement a quantity, both given in the same order. key_fraction and key_rate are judged on the scale that their
// error bounds refer to, gain * sifting (times herald_probability), where gain and herald_probability are among the
// quantities.
std::vector<Judgement> judge(const model::Chain& chain, const std::vector<fast::Value>& values,
                             const std::vector<reference::Result>& enclosed);

// x exactly.
model::Rational exact(const fast::Scaled& x);

}  // namespace heraldgauge::test
