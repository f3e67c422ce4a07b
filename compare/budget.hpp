#pragma once
// What somebody is ready to accept: a limit on the error of each quantity, from a TOML file with one table a quantity,
//
//     key_rate = { relative = "1e-6" }
//     gain = { relative = 1e-9, absolute = 1e-15 }   # the larger allowance counts
//     any = { relative = 1e-4 }                      # every quantity that is not named
//
//     [shortcuts.pair-cutoff]                        # for one shortcut; what it leaves out is taken from above
//     key_rate = { relative = 1e-3 }

#include <map>
#include <optional>
#include <string>
#include <string_view>

#include "reference/model/fault.hpp"
#include "reference/model/quantity.hpp"
#include "reference/model/rational.hpp"

namespace heraldgauge::compare {

struct Limit {
  std::optional<model::Rational> relative;  // in [0,1), of the exact value
  std::optional<model::Rational> absolute;  // >= 0
};

struct Limits {
  std::map<model::Quantity, Limit> named;
  std::optional<Limit> any;

  std::optional<Limit> limit(const model::Quantity& quantity) const;
};

struct Budget {
  Limits all;
  std::map<std::string, Limits> shortcuts;  // by id

  // The limit on a quantity, of one shortcut where an id is given; none where the budget says nothing of it.
  std::optional<Limit> limit(const model::Quantity& quantity, const std::string& shortcut = "") const;
};

// The first syntax fault, or every value fault. Whether a shortcut of that id exists is not judged.
model::Expected<Budget> read_budget(std::string_view text, const std::string& source);

}  // namespace heraldgauge::compare
