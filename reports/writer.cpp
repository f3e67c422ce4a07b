#include "reports/writer.hpp"

#include "reports/csv.hpp"
#include "reports/json.hpp"
#include "reports/record/document.hpp"
#include "reports/text.hpp"

namespace heraldgauge::reports {
namespace {

template <class Subject>
std::string write_as(Format format, const Subject& subject, const TextLayout& layout) {
  switch (format) {
    case Format::json:
      return json(subject);
    case Format::csv:
      return csv(subject);
    case Format::text:
      break;
  }
  return text(subject, layout);
}

}  // namespace

std::optional<Format> find_format(std::string_view name) {
  if (name == "text") return Format::text;
  if (name == "json") return Format::json;
  if (name == "csv") return Format::csv;
  return std::nullopt;
}

std::string write(const EncloseReport& report, Format format, const TextLayout& layout) {
  return write_as(format, document_of(report), layout);
}

std::string write(const QuickReport& report, Format format, const TextLayout& layout) {
  return write_as(format, document_of(report), layout);
}

std::string write(const ComparisonReport& report, Format format, const TextLayout& layout) {
  return write_as(format, document_of(report), layout);
}

std::string write(const ListReport& report, Format format, const TextLayout& layout) {
  return write_as(format, report, layout);
}

std::string write(const CertificateReport& report) { return json(document_of(report), report.versions); }

}  // namespace heraldgauge::reports
