#include <algorithm>
#include <utility>

#include "reference/model/fault.hpp"
#include "reports/audit_formats.hpp"
#include "reports/text_table.hpp"

namespace heraldgauge::reports {
namespace {

using model::printable;

// Rows that do not agree, shown one by one; the summary tells how many there are.
constexpr std::size_t most_rows_shown = 20;

std::string parameters_text(const Parameters& parameters) {
  std::string line;
  for (const auto& [key, value] : parameters)
    line += (line.empty() ? "" : ", ") + printable(key) + " = " + printable(value);
  return line;
}

std::string shown(const std::optional<std::string>& text) { return text ? *text : "-"; }
std::string shown(const std::optional<long>& number) { return number ? std::to_string(*number) : "-"; }

std::string where_text(const QuantitySummary& summary) {
  std::string lines;
  for (const DisagreementRange& range : summary.where) {
    const std::string reach = range.from == range.to ? range.from : range.from + " to " + range.to;
    const std::string table =
        range.table_from == range.table_to ? range.table_from : range.table_from + " to " + range.table_to;
    lines += "  " + printable(summary.quantity) + " is wrong at " + printable(range.key) + " = " + printable(reach) +
             " (the table covers " + printable(table) + (range.apart ? "; no number there agrees)" : ")") + "\n";
  }
  return lines;
}

class AuditText : public AuditWriter {
 public:
  AuditText(const TextLayout& layout, TextSink sink)
      : columns_(layout.columns ? static_cast<std::size_t>(std::max(*layout.columns, 20)) : std::string::npos),
        sink_(std::move(sink)) {}

  void begin(const std::string& title) override {
    if (!title.empty()) sink_(printable(title) + "\n\n");
  }

  void point(const AuditPoint& point) override {
    for (const AuditResult& result : point.results) {
      if (result.verdict == "agrees") continue;
      if (!rows_.empty() && rows_.size() > most_rows_shown) return;
      if (rows_.empty())
        rows_.push_back({"line", "point", "quantity", "given", "lower", "upper", "relative error", "verdict"});
      rows_.push_back({std::to_string(point.line), parameters_text(point.parameters), result.quantity,
                       printable(result.given), shown(result.lower), shown(result.upper), shown(result.relative_error),
                       result.verdict + (result.reason.empty() ? "" : ": " + printable(result.reason))});
    }
  }

  void end(const AuditConclusion& conclusion) override {
    write_rows(conclusion.summary);
    write_summary(conclusion.summary);
    write_causes(conclusion);
  }

 private:
  void write_rows(const AuditSummary& summary) {
    if (rows_.empty()) return;
    const std::size_t bad = summary.counts.all() - summary.counts.agrees;
    sink_(TextTable(rows_).text());
    if (bad > rows_.size() - 1)
      sink_("and " + std::to_string(bad - (rows_.size() - 1)) + " more (--format csv has them all)\n");
    sink_("\n");
  }

  void write_summary(const AuditSummary& summary) {
    std::vector<Cells> rows = {{"quantity", "numbers", "agree", "differ", "impossible", "undecided", "unreadable",
                                "digits worst", "digits median", "worst line"}};
    for (const QuantitySummary& one : summary.quantities) {
      const VerdictCounts& counts = one.counts;
      rows.push_back({one.quantity, std::to_string(counts.all()), std::to_string(counts.agrees),
                      std::to_string(counts.differs), std::to_string(counts.impossible),
                      std::to_string(counts.undecided), std::to_string(counts.unreadable), shown(one.digits_worst),
                      shown(one.digits_median), one.worst_line ? std::to_string(*one.worst_line) : "-"});
    }
    sink_(TextTable(rows).text());
    std::string remarks;
    for (const QuantitySummary& one : summary.quantities) remarks += where_text(one);
    for (const std::string& remark : summary.remarks) remarks += wrapped(remark, 0, 2, columns_) + "\n";
    if (!remarks.empty()) sink_("\n" + remarks);
  }

  void write_causes(const AuditConclusion& conclusion) {
    if (!conclusion.causes.empty())
      sink_("\nLikely causes, best first (share of the numbers explained, distance in tolerances):\n");
    for (const Cause& cause : conclusion.causes) sink_(cause_text(cause));
    if (!conclusion.causes_note.empty()) sink_("\n" + wrapped(conclusion.causes_note, 0, 0, columns_) + "\n");
  }

  std::string cause_text(const Cause& cause) const {
    const std::string head = "  " + cause.cause + (cause.setting ? " (" + *cause.setting + ")" : "") + "  " +
                             cause.kind + "  explains " + cause.explains + "  residual " + cause.residual + "\n";
    std::string body = "      " + wrapped(cause.sentence, 6, 6, columns_) + "\n";
    if (!cause.together_with.empty()) body += listed("together with: ", cause.together_with);
    if (!cause.same_as.empty()) body += listed("not to be told from it on this table: ", cause.same_as);
    return head + body;
  }

  std::string listed(const std::string& start, const std::vector<std::string>& names) const {
    std::string line = start;
    for (const std::string& name : names) line += (line == start ? "" : ", ") + name;
    return "      " + wrapped(line, 6, 6, columns_) + "\n";
  }

  std::size_t columns_;
  TextSink sink_;
  std::vector<Cells> rows_;
};

}  // namespace

std::unique_ptr<AuditWriter> make_audit_text(const TextLayout& layout, TextSink sink) {
  return std::make_unique<AuditText>(layout, std::move(sink));
}

std::unique_ptr<AuditWriter> make_audit_writer(Format format, const TextLayout& layout, TextSink sink) {
  switch (format) {
    case Format::json:
      return make_audit_json(std::move(sink));
    case Format::csv:
      return make_audit_csv(std::move(sink));
    case Format::text:
      break;
  }
  return make_audit_text(layout, std::move(sink));
}

}  // namespace heraldgauge::reports
