#pragma once
// One quantity from the tables of a chain.

#include <optional>
#include <string>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/model/quantity.hpp"
#include "reference/quantities.hpp"
#include "reference/tables.hpp"

namespace heraldgauge::reference {

// A value, or the reason why there is none. `scale` is what the asked width may refer to where it exceeds the value
// (gain * sifting for key figures), else absent.
template <class Number>
struct Computed {
  std::optional<Number> value;
  std::string undefined;
  std::optional<Number> scale;
};

inline const std::string no_herald = "no herald can occur: herald_probability is 0";
inline const std::string no_events = "no event has a click at each end: gain is 0";

// The quantities that are rational in the tables; requires that the registry does not call the quantity irrational, and
// a pattern for pattern_probability.
template <class Tables>
Computed<typename Tables::Number> rational_quantity(Tables& tables, const model::Chain& chain,
                                                    const model::Quantity& quantity,
                                                    const std::optional<model::Pattern>& pattern);

// key_fraction and key_rate; the tables' numbers enter at the precision `bits`.
template <class Tables>
Computed<Interval> key_quantity(Tables& tables, const model::Chain& chain, model::QuantityKind kind, Precision bits);

// visibility and visibility_deficit.
Computed<Interval> visibility_quantity(IntervalTables& tables, model::QuantityKind kind);

// The four capacities; undefined where infinite.
Computed<Interval> capacity_quantity(const model::Chain& chain, model::QuantityKind kind, Precision bits);

}  // namespace heraldgauge::reference
