#pragma once
// What an audit says of somebody else's numbers.

#include <cstddef>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "reports/record/results.hpp"

namespace heraldgauge::reports {

// One number judged. lower and upper are absent where the quantity is undefined, relative_error where the exact value
// is zero, both and the digits where the number cannot be read.
struct AuditResult {
  std::string quantity;
  std::string given;  // as typed
  std::optional<std::string> lower;
  std::optional<std::string> upper;
  std::optional<std::string> relative_error;
  std::optional<long> agreeing_digits;
  std::string verdict;  // agrees | differs | impossible | undecided | unreadable
  std::string status;   // ok | not-a-number | malformed
  std::string reason;   // why it is impossible, undecided or unreadable
};

struct AuditPoint {
  std::size_t row = 0;   // of the table, from 1, the header not counted
  std::size_t line = 0;  // where it starts, from 1
  Parameters parameters;
  std::vector<AuditResult> results;
};

struct VerdictCounts {
  std::size_t agrees = 0;
  std::size_t differs = 0;
  std::size_t impossible = 0;
  std::size_t undecided = 0;
  std::size_t unreadable = 0;

  std::size_t all() const { return agrees + differs + impossible + undecided + unreadable; }
};

// Where along one parameter the numbers lie that differ or are impossible, within what the whole table covers.
struct DisagreementRange {
  std::string key;
  std::string from, to;
  std::string table_from, table_to;
  bool apart = false;  // no number that agrees lies in that range
};

struct QuantitySummary {
  std::string quantity;
  VerdictCounts counts;
  std::optional<long> digits_worst;  // agreeing digits over the numbers that could be read
  std::optional<long> digits_median;
  std::optional<std::size_t> worst_line;
  std::vector<DisagreementRange> where;
};

struct AuditSummary {
  std::size_t rows = 0;
  VerdictCounts counts;
  std::vector<QuantitySummary> quantities;
  std::vector<std::string> remarks;  // what is remarkable without being wrong
};

// A likely cause of what differs.
struct Cause {
  std::string cause;  // id
  std::string kind;   // shortcut | convention | pattern
  std::optional<std::string> setting;
  std::string explains;                    // share of the compared numbers that it gives within their tolerances
  std::string residual;                    // root mean square distance to the numbers, in tolerances
  std::vector<std::string> together_with;  // causes that act with it, where it does not explain the table alone
  std::vector<std::string> same_as;        // causes, or "a + b", that this table cannot tell from it
  std::string sentence;
};

struct AuditConclusion {
  AuditSummary summary;
  std::vector<Cause> causes;  // best first; empty where the numbers agree
  std::string causes_note;    // what was looked for in vain, or why nothing was
};

}  // namespace heraldgauge::reports
