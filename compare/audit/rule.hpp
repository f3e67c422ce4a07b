#pragma once
// When a number counts as right: by default half a unit of its last printed digit or 1e-12 of the exact value,
// whichever is larger.

#include <optional>

#include "compare/audit/printed_number.hpp"
#include "compare/budget.hpp"
#include "reference/enclose.hpp"

namespace heraldgauge::compare {

// A reading tolerance: of a number printed on an axis, or of a point read from a plot.
struct ReadingTolerance {
  enum class Kind { axis_units, relative, decades } kind = Kind::axis_units;
  model::Rational size;  // >= 0; relative: below 1 (0.02 for 2 %)
};

struct Digitised {
  ReadingTolerance x;
  ReadingTolerance y;
};

struct Rule {
  bool as_printed = false;                  // half a unit of the last printed digit alone
  std::optional<model::Rational> relative;  // in [0,1): of the exact value
  std::optional<model::Rational> absolute;  // >= 0; with `relative`, the larger of the two counts
  std::optional<Digitised> digitised;
  Budget budget;  // for the quantities that it names
};

inline const model::Rational relative_floor{1, 1000000000000};

// The exact values with which a printed number agrees: a closed interval round it.
struct Acceptance {
  model::Rational lower;
  model::Rational upper;
};

// `tolerance`: of the table's own column, absolute; it comes before the rule.
Acceptance accepted(const PrintedNumber& number, const std::optional<model::Rational>& tolerance,
                    const model::Quantity& quantity, const Rule& rule);

// {x : |value - x| <= max(absolute, relative |x|)}, for relative in [0,1).
Acceptance within(const model::Rational& value, const model::Rational& absolute, const model::Rational& relative);

// The values that a reading at `value` may mean.
Acceptance read_within(const model::Rational& value, const ReadingTolerance& tolerance);

enum class Judgement { agrees, differs, undecided };

// Three-valued: agrees where every number of the enclosure is accepted, differs where none is.
Judgement judge(const Acceptance& acceptance, const reference::Enclosure& exact);

// "0.5", "2%" or "0.05dec" as a reading tolerance.
model::Expected<ReadingTolerance> read_tolerance(std::string_view text);

}  // namespace heraldgauge::compare
