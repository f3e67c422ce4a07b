#pragma once
// Departures that only change the inputs: what they give are the exact values of another chain.

#include "compare/departure.hpp"

namespace heraldgauge::compare {

// Completes a departure whose transform is set: evaluate by the binary64 evaluator, enclose by the reference, both on
// the transformed case.
Departure by_other_chain(Departure departure);

// The same for a departure that edits the chain, whatever the scenario.
Departure by_edited_chain(Departure departure, const std::function<void(model::Chain&)>& edit);

// Values of a chain by the binary64 evaluator, and by the reference.
std::vector<Value> values_of(const Case& point, const std::vector<model::Quantity>& quantities);
std::vector<CertifiedValue> certified_values_of(const Case& point, const std::vector<model::Quantity>& quantities,
                                                int digits);

// Results of the reference as certified values.
std::vector<CertifiedValue> as_certified_values(const std::vector<reference::Result>& results);

// Every quantity declined for one reason.
std::vector<Value> declined(const std::vector<model::Quantity>& quantities, const std::string& reason);
std::vector<CertifiedValue> declined_certified(const std::vector<model::Quantity>& quantities,
                                               const std::string& reason);
// The faults in one line.
std::string in_words(const model::Faults& faults);

}  // namespace heraldgauge::compare
