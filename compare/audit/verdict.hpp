#pragma once
// The verdict on one number of a table.

#include <optional>
#include <string>

#include "compare/audit/known_point.hpp"

namespace heraldgauge::compare {

enum class Verdict { agrees, differs, impossible, undecided, unreadable };

std::string verdict_text(Verdict verdict);

struct JudgedNumber {
  Verdict verdict = Verdict::unreadable;
  std::string status = "ok";  // ok | not-a-number | malformed
  std::string reason;
  std::optional<PrintedNumber> number;
  Acceptance acceptance;
  std::optional<long> agreeing_digits;
  std::optional<double> relative_error;  // of the number, against the middle of the enclosure; approximate
  int wanted_digits = 0;                 // more than the known value has where the verdict or the digits ask for it
  bool above_chain = false;              // a key rate above 2 capacity_chain, 2 capacity_point: remarkable
  bool above_point = false;
};

// What a quantity's cell and the known value give. `tolerance` as in `accepted`. Requires a text without a decimal
// comma.
//
// A key rate above twice the capacity of an arm by more than half a unit of its last printed digit (or its reading
// tolerance) is impossible, whatever else agrees: the arm bounds every protocol. Twice capacity_chain and twice
// capacity_point bound none, and are only remarked on.
JudgedNumber judge_number(std::string_view text, const std::optional<model::Rational>& tolerance,
                          const Subject& subject, const KnownPoint& point, std::size_t quantity);

}  // namespace heraldgauge::compare
