#pragma once
// What a departure costs at one point: its value against the enclosure of the exact one.

#include "compare/departure.hpp"
#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::compare {

enum class Bias { optimistic, pessimistic, neutral, exact };

// A departure with its setting.
struct Chosen {
  const Departure* departure;
  Setting setting;
};

struct DepartureError {
  model::Quantity quantity;
  fast::Status status = fast::Status::declined;  // of the departure's value
  std::string reason;
  std::string effort;                             // of a sample
  std::optional<model::Rational> value;           // where computed: exactly the number, or the middle of its enclosure
  std::optional<reference::Enclosure> exact;      // the certified exact value, where there is one
  std::optional<model::Rational> relative;        // (value - exact)/exact; absent where the exact value may be 0
  std::optional<reference::Enclosure> certified;  // of the relative error; absent where the value is only computed
  int digits_left = 0;
  Bias bias = Bias::neutral;

  // Whether |relative error| is certainly at most, or certainly above, a limit.
  bool certainly_within(const model::Rational& limit) const;
  bool certainly_beyond(const model::Rational& limit) const;
};

struct ErrorRequest {
  std::vector<model::Quantity> quantities;
  int digits = 15;  // of the enclosures that are compared
};

// One error a quantity, in the order asked. Faults where the exact values cannot be asked for.
model::Expected<std::vector<DepartureError>> errors_of(const Case& point, const Chosen& chosen,
                                                       const ErrorRequest& request);

// The same for two departures at once, the first applied before the second: nothing where they cannot be combined.
std::optional<Departure> combined(const Chosen& first, const Chosen& second);

// Certified values of the case itself.
model::Expected<std::vector<CertifiedValue>> exact_values(const Case& point, const ErrorRequest& request);
// The errors against exact values that are known already.
std::vector<DepartureError> errors_against(const std::vector<CertifiedValue>& exact, const Case& point,
                                           const Chosen& chosen, const ErrorRequest& request);

std::string text_of(Bias bias);

}  // namespace heraldgauge::compare
