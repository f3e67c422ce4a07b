#pragma once
// An audit as the table comes in: rows in blocks, each distinct point certified once.

#include <functional>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "compare/audit/columns.hpp"
#include "compare/audit/point_store.hpp"
#include "compare/audit/sample.hpp"
#include "compare/audit/summary.hpp"
#include "compare/table/row.hpp"
#include "reports/record/audit.hpp"

namespace heraldgauge::compare {

struct AuditOptions {
  std::vector<model::Quantity> quantities;  // empty: every column that is named by one
  Rule rule;
  unsigned threads = 0;  // 0: as many as the machine has; the answer does not depend on it
};

// Is given every row judged, in the order of the table.
using TakePoint = std::function<void(const reports::AuditPoint&)>;

class Auditor : public RowConsumer {
 public:
  // The scenario must outlive the auditor.
  Auditor(const model::Scenario& scenario, const AuditOptions& options, std::string source, TakePoint take);

  std::optional<model::Fault> columns(const std::vector<std::string>& names) override;
  std::optional<model::Fault> row(TableRow&& row) override;
  // Judges the rows that still wait; after the table's last row.
  void finish();

  const model::Faults& faults() const { return faults_; }  // of values, up to a limit
  const std::vector<std::string>& warnings() const { return columns_.warnings; }
  const Subject& subject() const { return subject_; }
  const Sample& sample() const { return sample_; }
  reports::AuditSummary summary() const;  // requires that columns() was called

 private:
  // One row of the block being judged.
  struct Waiting {
    TableRow row;
    std::string key;
    std::shared_ptr<KnownPoint> point;
    std::vector<JudgedNumber> judged;  // one a quantity column
  };

  void judge_block();
  void judge_cells(const Waiting& waiting);
  void certify_points();
  void judge(Waiting& waiting) const;
  std::vector<PointStore::Refinement> refinements() const;
  void hand_over(const Waiting& waiting);
  reports::AuditResult result_of(const Waiting& waiting, std::size_t quantity) const;

  Subject subject_;
  std::vector<model::Quantity> asked_;
  unsigned threads_;
  std::string source_;
  TakePoint take_;
  PointStore store_;
  Columns columns_;
  std::vector<Waiting> block_;
  model::Faults faults_;
  std::optional<SummaryGatherer> summary_;
  Sample sample_;
};

}  // namespace heraldgauge::compare
