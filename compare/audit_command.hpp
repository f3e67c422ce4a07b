#pragma once
// The command `audit`: judges somebody else's numbers and names likely causes of what differs.

#include <string>
#include <vector>

#include "compare/audit/auditor.hpp"
#include "reports/record/audit.hpp"

namespace heraldgauge::compare {

struct AuditAnswer {
  reports::AuditConclusion conclusion;
  std::vector<std::string> warnings;  // of columns that mean nothing
};

// Reads a table of results to its end, hands over each row as it is judged, and then says what it found. Faults of the
// table (form: the first; values: up to twenty) leave the rows handed over before without meaning.
//
// Bounded memory: rows go through in blocks, distinct points are kept while they take little, causes are sought on a
// selection of the numbers.
model::Expected<AuditAnswer> audit_command(const model::Scenario& scenario, ByteSource bytes, const std::string& source,
                                           const AuditOptions& options, const TakePoint& take);

}  // namespace heraldgauge::compare
