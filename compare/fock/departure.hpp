#pragma once
// Departures that the explicit Fock evaluator serves, in binary64 and as certified enclosures.

#include "compare/departure.hpp"
#include "compare/fock/chain.hpp"

namespace heraldgauge::compare::fock {

// How a departure changes the evaluation.
struct Recipe {
  // The pairs to keep per source so that what is left out stays below 2^log2_tail; where the departure itself cuts off,
  // its own cut-offs, and `tail` is absent.
  std::function<std::vector<long>(const model::Chain&, const Setting&, double log2_tail)> cuts;
  // Turns the description of the model with those cut-offs into that of the departure.
  std::function<void(Description&, const Setting&)> change;
  // An upper bound on |what is left out| of any of its probabilities.
  std::function<Interval(const model::Chain&, const std::vector<long>& cuts, reference::Precision bits)> tail;
};

// Completes a departure with evaluate and enclose. Declined: shared background, too many pairs to keep.
Departure by_fock(Departure departure, const Recipe& recipe);

// The same for a departure with all pair numbers of the model, which changes what happens to them. `tail` bounds what
// is left out where a response may exceed 1.
using Tail = Interval (*)(const model::Chain&, const std::vector<long>& cuts, reference::Precision bits);
Departure by_changed_response(Departure departure, const std::function<void(Description&)>& change, Tail tail);

// Both changes at once: the cut-offs are those of the one that cuts off. Nothing where both do.
std::optional<Recipe> both(const Recipe& first, const Setting& first_setting, const Recipe& second,
                           const Setting& second_setting);

// Cut-offs for the model's pair numbers, P(n > m) = lam^(m+1) (1 + (m+1)(1-lam)), and for Poisson pair numbers,
// P(n > m) <= mean^(m+1)/(m+1)!; and the sums over the sources of these bounds.
std::vector<long> cuts_for_model(const model::Chain& chain, double log2_tail);
std::vector<long> cuts_for_poisson(const model::Chain& chain, double log2_tail);
Interval tail_of_model(const model::Chain& chain, const std::vector<long>& cuts, reference::Precision bits);
Interval tail_of_poisson(const model::Chain& chain, const std::vector<long>& cuts, reference::Precision bits);

// A description of the model itself with these cut-offs, to be changed.
Description model_description(const model::Chain& chain, const std::vector<long>& cuts);

// The description that a recipe gives.
Description described(const Recipe& recipe, const model::Chain& chain, const Setting& setting,
                      const std::vector<long>& cuts);

// Binary64 (or binary32) values of a description.
template <class Number>
std::vector<Value> values_in(const Description& description, const Case& point,
                             const std::vector<model::Quantity>& quantities);

}  // namespace heraldgauge::compare::fock
