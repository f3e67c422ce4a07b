#pragma once
// The key quantities from changed error rates or entropies, for departures that work on values.

#include "compare/formula.hpp"

namespace heraldgauge::compare {

struct KeyInputs {
  Term gain, rectilinear, diagonal, herald;
};
// key_fraction or key_rate of the model from these; `unit` multiplies both entropies (1 for bits, ln 2 for natural
// units).
Term key_from(const KeyInputs& inputs, const model::Protocol& protocol, model::QuantityKind kind,
              const reference::Interval& unit);

// Those of the case itself.
KeyInputs key_inputs(const Case& point, Terms& terms);

// A quantity where both error rates are replaced by those of a formula (given qber_rectilinear or qber_diagonal), and
// everything else is as the terms have it.
using ErrorRate = std::function<Term(const Case&, model::QuantityKind, Terms&)>;
Term with_error_rates(const Case& point, const model::Quantity& quantity, Terms& terms, const ErrorRate& rate);

}  // namespace heraldgauge::compare
