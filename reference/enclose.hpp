#pragma once
// The entry of the reference evaluator: certified enclosures of quantities of one chain. It picks a route, raises the
// precision (and the cut-offs) until the asked width is met, and says how each value was certified.

#include <optional>
#include <string>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/fault.hpp"
#include "reference/model/pattern.hpp"
#include "reference/model/quantity.hpp"
#include "reference/model/rational.hpp"

namespace heraldgauge::reference {

enum class RouteChoice { cheaper, determinant, pair_number };

struct Request {
  std::vector<model::Quantity> quantities;
  std::optional<model::Pattern> pattern;  // for pattern_probability
  // Asked width: at most 10^-digits * max(|value|, scale), scale = gain*sifting for key_fraction, that times
  // herald_probability for key_rate, 0 for all others. From 1 to largest_digits.
  int digits = 30;
  RouteChoice route = RouteChoice::cheaper;
  // Exact rationals are used where they are possible and short: at most two stations and inputs of moderate length.
  bool exact = false;           // always exact rationals, or a fault that names what is irrational
  bool intervals_only = false;  // never exact rationals: many values at few digits are quicker in intervals
  long largest_precision_bits = 1L << 18;
};

inline constexpr int largest_digits = 10000;

enum class Status { certified, undecided, undefined };

// The exact value lies in [lower, upper]; both ends are exact numbers.
struct Enclosure {
  model::Rational lower;
  model::Rational upper;
};

// How a number was certified.
struct Certificate {
  std::string route;                   // "determinant", "pair-number" or "closed-form"
  std::vector<long> cutoff;            // pairs kept per source; empty where nothing was cut off
  model::Rational tail_bound;          // upper bound on the probability left out
  std::optional<long> precision_bits;  // none where the value was computed in exact rationals
};

struct Result {
  model::Quantity quantity;
  Status status = Status::undefined;
  std::string reason;                  // why it is undecided or undefined
  std::optional<Enclosure> enclosure;  // absent exactly where the status is undefined
  Certificate certificate;
  int digits = 0;  // certified: floor(-log10 of the relative width), at most the asked digits; 99 where exact
};

// One result a quantity, in the order asked. Faults name a combination that cannot be served: a pattern that is missing
// or does not fit the chain, a forced route that cannot serve the chain, --exact with an irrational input or quantity.
model::Expected<std::vector<Result>> enclose(const model::Chain& chain, const Request& request);

// A result as decimals of at most digits + 2 significant digits: value inside [lower, upper], lower rounded down, upper
// up.
struct DecimalEnclosure {
  std::string value;
  std::string lower;
  std::string upper;
};
DecimalEnclosure decimals(const Enclosure& enclosure, int digits);

}  // namespace heraldgauge::reference
