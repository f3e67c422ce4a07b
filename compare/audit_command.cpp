#include "compare/audit_command.hpp"

#include <utility>

#include "compare/causes/find_causes.hpp"
#include "compare/points.hpp"

namespace heraldgauge::compare {

model::Expected<AuditAnswer> audit_command(const model::Scenario& scenario, ByteSource bytes, const std::string& source,
                                           const AuditOptions& options, const TakePoint& take) {
  Auditor auditor(scenario, options, source, take);
  const auto fault = read_table(std::move(bytes), source, auditor);
  if (!fault) auditor.finish();
  if (!auditor.faults().empty()) return distinct(auditor.faults());
  if (fault) return *fault;

  AuditAnswer answer;
  answer.warnings = auditor.warnings();
  answer.conclusion.summary = auditor.summary();
  if (answer.conclusion.summary.rows == 0)
    return model::Fault{{source, 0, 0, ""}, "the table has no rows", "at least one"};
  CausesFound found = find_causes(auditor.sample(), auditor.subject(), options.threads);
  answer.conclusion.causes = std::move(found.causes);
  answer.conclusion.causes_note = std::move(found.note);
  return answer;
}

}  // namespace heraldgauge::compare
