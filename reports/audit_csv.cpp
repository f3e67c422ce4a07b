#include <utility>

#include "reports/audit_formats.hpp"
#include "reports/csv.hpp"

namespace heraldgauge::reports {
namespace {

std::string text_of(const std::optional<long>& value) { return value ? std::to_string(*value) : ""; }

class AuditCsv : public AuditWriter {
 public:
  explicit AuditCsv(TextSink sink) : sink_(std::move(sink)) {}

  void begin(const std::string&) override {}

  void point(const AuditPoint& point) override {
    if (!headed_) write_header(point.parameters);
    std::string start = std::to_string(point.row) + "," + std::to_string(point.line);
    for (const auto& [key, value] : point.parameters) start += "," + csv_text(value);
    for (const AuditResult& result : point.results) {
      sink_(start + "," + csv_text(result.quantity) + "," + csv_text(result.given) + "," + result.lower.value_or("") +
            "," + result.upper.value_or("") + "," + result.relative_error.value_or("") + "," +
            text_of(result.agreeing_digits) + "," + result.verdict + "," + result.status + "," +
            csv_text(result.reason) + "\r\n");
    }
  }

  void end(const AuditConclusion&) override {}

 private:
  void write_header(const Parameters& parameters) {
    headed_ = true;
    std::string header = "row,line";
    for (const auto& [key, value] : parameters) header += "," + csv_text(key);
    sink_(header + ",quantity,given,lower,upper,relative_error,agreeing_digits,verdict,status,reason\r\n");
  }

  TextSink sink_;
  bool headed_ = false;
};

}  // namespace

std::unique_ptr<AuditWriter> make_audit_csv(TextSink sink) { return std::make_unique<AuditCsv>(std::move(sink)); }

}  // namespace heraldgauge::reports
