#include "compare/audit/auditor.hpp"

#include <algorithm>
#include <map>
#include <set>

#include "compare/parallel.hpp"
#include "reference/arithmetic/decimal.hpp"

namespace heraldgauge::compare {
namespace {

using model::Fault;
using model::Faults;

constexpr std::size_t block_size = 8192;
constexpr std::size_t rows_a_piece = 256;  // of a block, judged by one thread at a time
// Value faults reported of a table; more of them say nothing new.
constexpr std::size_t most_faults = 20;
constexpr int error_digits = 4;
constexpr char cell_separator = '\x1f';  // a control character, which no cell holds

std::string place_of(const std::string& source, const TableRow& row) { return source + ":" + std::to_string(row.line); }

// The cells that set the point, joined.
std::string key_of(const TableRow& row, const Columns& columns) {
  std::string key;
  for (const ParameterColumn& column : columns.parameters) key += row.cells[column.column] + cell_separator;
  return key;
}

// The absolute tolerance in a row; none where its cell is empty. Requires a cell that judge_cells() let pass.
std::optional<model::Rational> tolerance_in(const TableRow& row, const QuantityColumn& column) {
  if (!column.tolerance || trimmed(row.cells[*column.tolerance]).empty()) return std::nullopt;
  return *model::parse_exact(trimmed(row.cells[*column.tolerance]));
}

}  // namespace

Auditor::Auditor(const model::Scenario& scenario, const AuditOptions& options, std::string source, TakePoint take)
    : subject_{scenario, {}, options.rule, std::nullopt},
      asked_(options.quantities),
      threads_(options.threads),
      source_(std::move(source)),
      take_(std::move(take)),
      store_(subject_, threads_) {}

std::optional<Fault> Auditor::columns(const std::vector<std::string>& names) {
  auto columns = understand(names, subject_.scenario, asked_, source_);
  if (!columns) {
    faults_ = columns.faults();
    return faults_.front();
  }
  columns_ = std::move(columns.value());
  std::vector<std::string> keys;
  for (const ParameterColumn& column : columns_.parameters) keys.push_back(column.key);
  for (const QuantityColumn& column : columns_.quantities) subject_.quantities.push_back(column.quantity);
  summary_.emplace(subject_.quantities, keys);
  if (!subject_.rule.digitised) return std::nullopt;
  const bool numeric = !columns_.parameters.empty() &&
                       columns_.parameters.front().entry->domain->kind == model::reading::Domain::Kind::number;
  if (!numeric)
    return Fault{{source_, 1, 0, ""}, "no column is a horizontal axis", "a key with numbers as the first parameter"};
  subject_.axis = 0;
  return std::nullopt;
}

std::optional<Fault> Auditor::row(TableRow&& row) {
  std::string key = key_of(row, columns_);
  block_.push_back({std::move(row), std::move(key), nullptr, {}});
  judge_cells(block_.back());
  if (block_.size() >= block_size) judge_block();
  if (faults_.size() >= most_faults) return faults_.front();
  return std::nullopt;
}

void Auditor::finish() { judge_block(); }

reports::AuditSummary Auditor::summary() const { return summary_->summary(); }

// What is a fault of the table and no verdict: a decimal comma, a tolerance that is none.
void Auditor::judge_cells(const Waiting& waiting) {
  const auto fault = [&](const std::string& column, const std::string& wrong, const std::string& allowed) {
    faults_.push_back({{place_of(source_, waiting.row), 0, 0, column}, wrong, allowed});
  };
  for (const QuantityColumn& column : columns_.quantities) {
    const std::string name = model::name_of(column.quantity);
    const std::string& cell = waiting.row.cells[column.column];
    if (has_decimal_comma(trimmed(cell))) fault(name, "'" + cell + "' has a comma", "a point before the decimals");
    if (!column.tolerance) continue;
    const std::string_view tolerance = trimmed(waiting.row.cells[*column.tolerance]);
    const auto number = model::parse_exact(tolerance);
    if (!tolerance.empty() && (!number || *number < 0)) {
      fault(name + ".tolerance", "'" + std::string(tolerance) + "'", "a number of 0 or more, or nothing");
    }
  }
}

void Auditor::judge_block() {
  certify_points();
  if (!faults_.empty()) {
    block_.clear();
    return;
  }
  const std::size_t pieces = (block_.size() + rows_a_piece - 1) / rows_a_piece;
  for_each_index(pieces, threads_, [&](std::size_t piece) {
    const std::size_t end = std::min(block_.size(), (piece + 1) * rows_a_piece);
    for (std::size_t i = piece * rows_a_piece; i < end; ++i) judge(block_[i]);
  });
  for (auto wanted = refinements(); !wanted.empty(); wanted = refinements()) {
    store_.refine(wanted);
    std::set<const KnownPoint*> refined;
    for (const PointStore::Refinement& one : wanted) refined.insert(one.point.get());
    for (Waiting& waiting : block_) {
      if (refined.contains(waiting.point.get())) judge(waiting);
    }
  }
  for (const Waiting& waiting : block_) hand_over(waiting);
  block_.clear();
}

void Auditor::certify_points() {
  std::vector<PointStore::Wanted> wanted;
  std::map<std::string, std::size_t> fresh;
  for (Waiting& waiting : block_) {
    waiting.point = store_.find(waiting.key);
    if (waiting.point || !fresh.emplace(waiting.key, wanted.size()).second) continue;
    const std::string place = place_of(source_, waiting.row);
    auto changes = changes_of(waiting.row.cells, columns_, subject_.scenario.inputs, place);
    if (changes) {
      wanted.push_back({waiting.key, std::move(changes.value()), place});
    } else if (faults_.size() < most_faults) {
      faults_.insert(faults_.end(), changes.faults().begin(), changes.faults().end());
    }
  }
  if (!faults_.empty()) return;
  faults_ = store_.certify(wanted);
  if (faults_.size() > most_faults) faults_.resize(most_faults);
  for (Waiting& waiting : block_) {
    if (!waiting.point) waiting.point = store_.find(waiting.key);
  }
}

void Auditor::judge(Waiting& waiting) const {
  waiting.judged.clear();
  for (std::size_t i = 0; i < columns_.quantities.size(); ++i) {
    const QuantityColumn& column = columns_.quantities[i];
    waiting.judged.push_back(
        judge_number(waiting.row.cells[column.column], tolerance_in(waiting.row, column), subject_, *waiting.point, i));
  }
}

std::vector<PointStore::Refinement> Auditor::refinements() const {
  std::map<std::pair<KnownPoint*, std::size_t>, PointStore::Refinement> wanted;
  for (const Waiting& waiting : block_) {
    for (std::size_t i = 0; i < waiting.judged.size(); ++i) {
      const int digits = waiting.judged[i].wanted_digits;
      if (digits == 0 || digits > most_judging_digits) continue;
      auto [place, added] =
          wanted.try_emplace({waiting.point.get(), i}, PointStore::Refinement{waiting.point, i, digits});
      place->second.digits = std::max(place->second.digits, digits);
    }
  }
  std::vector<PointStore::Refinement> list;
  for (auto& [key, refinement] : wanted) list.push_back(std::move(refinement));
  return list;
}

reports::AuditResult Auditor::result_of(const Waiting& waiting, std::size_t quantity) const {
  const JudgedNumber& judged = waiting.judged[quantity];
  const KnownValue& known = waiting.point->values[quantity];
  reports::AuditResult result;
  result.quantity = model::name_of(subject_.quantities[quantity]);
  result.given = trimmed(waiting.row.cells[columns_.quantities[quantity].column]);
  if (known.exact) {
    result.lower = known.shown.lower;
    result.upper = known.shown.upper;
  }
  if (judged.relative_error) {
    result.relative_error =
        reference::decimal(model::Rational(*judged.relative_error), error_digits, reference::Direction::nearest);
  }
  result.agreeing_digits = judged.agreeing_digits;
  result.verdict = verdict_text(judged.verdict);
  result.status = judged.status;
  result.reason = judged.reason;
  return result;
}

void Auditor::hand_over(const Waiting& waiting) {
  const std::size_t row = summary_->add_row();
  reports::AuditPoint point{row, waiting.row.line, waiting.point->parameters, {}};
  for (std::size_t i = 0; i < waiting.judged.size(); ++i) {
    summary_->add(i, waiting.judged[i], *waiting.point, waiting.row.line);
    sample_.add(waiting.judged[i], *waiting.point, i, waiting.row.line);
    point.results.push_back(result_of(waiting, i));
  }
  take_(point);
}

}  // namespace heraldgauge::compare
