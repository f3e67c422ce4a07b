#pragma once
// Short words for tests of shortcuts and conventions: a case from a chain, a certified value, an expectation that holds
// for the whole enclosure.

#include <gtest/gtest.h>

#include <cmath>

#include "compare/departure_error.hpp"
#include "compare/registry.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::compare {

inline const Departure& departure_named(const std::string& id) {
  const Departure* departure = find_departure(id);
  if (departure == nullptr) throw std::runtime_error("no departure " + id);
  return *departure;
}

inline Case case_of(const model::Chain& chain) { return {nullptr, {}, chain, std::nullopt}; }

inline model::Quantity quantity_named(const std::string& name) { return model::find_quantity(name).value(); }

// The enclosure that a departure gives, to 20 digits.
inline reference::Enclosure enclosure_by(const std::string& id, const Case& point, const std::string& quantity,
                                         const Setting& setting = {}) {
  const Departure& departure = departure_named(id);
  const auto used = checked_setting(departure, setting);
  if (!used) throw std::runtime_error("setting refused");
  const auto values = departure.enclose(point, {quantity_named(quantity)}, *used, 20);
  if (!values.front().enclosure) throw std::runtime_error(id + " " + quantity + ": " + values.front().reason);
  return *values.front().enclosure;
}

// The enclosure contains the exact number, and is narrow.
inline void expect_encloses(const reference::Enclosure& enclosure, const model::Rational& exact) {
  EXPECT_LE(enclosure.lower, exact);
  EXPECT_GE(enclosure.upper, exact);
  EXPECT_LE(model::Rational(enclosure.upper - enclosure.lower),
            model::Rational(abs(exact) / model::Rational("1000000000000")));
}

// Every number of the enclosure is close to a double.
inline void expect_near(const reference::Enclosure& enclosure, double expected, double relative) {
  EXPECT_NEAR(enclosure.lower.get_d(), expected, relative * std::abs(expected));
  EXPECT_NEAR(enclosure.upper.get_d(), expected, relative * std::abs(expected));
}

inline DepartureError error_of(const std::string& id, const Case& point, const std::string& quantity,
                               const Setting& setting = {}) {
  const Departure& departure = departure_named(id);
  const auto errors =
      errors_of(point, {&departure, *checked_setting(departure, setting)}, {{quantity_named(quantity)}, 15});
  if (!errors) throw std::runtime_error("no errors");
  return errors->front();
}

}  // namespace heraldgauge::compare
