#include "reports/record/document.hpp"

namespace heraldgauge::reports {
namespace {

Cell text(const std::string& value) { return value.empty() ? Cell(Absent{}) : Cell(Text{value}); }
Cell text(const std::optional<std::string>& value) { return value ? Cell(Text{*value}) : Cell(Absent{}); }
Cell number(const std::optional<std::string>& value) { return value ? Cell(Number{*value}) : Cell(Absent{}); }

template <class T>
Cell counted(const std::optional<T>& value) {
  return value ? Cell(*value) : Cell(Absent{});
}

Row row_of(const EncloseResult& result) {
  return {{"quantity", Text{result.quantity}},
          {"status", Text{result.status}},
          {"reason", text(result.reason)},
          {"value", number(result.value)},
          {"lower", number(result.lower)},
          {"upper", number(result.upper)},
          {"exact", number(result.exact)},
          {"digits", long{result.digits}},
          {"route", text(result.route)},
          {"cutoff", counted(result.cutoff)},
          {"tail_bound", number(result.tail_bound)},
          {"precision_bits", counted(result.precision_bits)}};
}

Row row_of(const CertificateEntry& entry) {
  return {{"quantity", Text{entry.quantity}},
          {"status", Text{entry.status}},
          {"reason", text(entry.reason)},
          {"lower", number(entry.lower)},
          {"upper", number(entry.upper)},
          {"route", text(entry.route)},
          {"cutoff", counted(entry.cutoff)},
          {"tail_bound", number(entry.tail_bound)},
          {"precision_bits", counted(entry.precision_bits)}};
}

Row row_of(const QuickResult& result) {
  return {{"quantity", Text{result.quantity}},
          {"status", Text{result.status}},
          {"reason", text(result.reason)},
          {"value", number(result.value)},
          {"relative_error_bound", number(result.relative_error_bound)}};
}

Row row_of(const ComparisonRow& row) {
  return {{"quantity", Text{row.quantity}},
          {"certified", Number{row.certified}},
          {"compared", Number{row.compared}},
          {"digits_left", long{row.digits_left}}};
}

template <class Report>
Document document(std::string_view command, const Report& report) {
  Document result{command, report.title, {}};
  result.points.reserve(report.points.size());
  for (const auto& point : report.points) {
    Point& added = result.points.emplace_back(Point{point.parameters, {}});
    for (const auto& one : point.results) added.rows.push_back(row_of(one));
  }
  return result;
}

struct PlainText {
  std::string operator()(const Absent&) const { return ""; }
  std::string operator()(const Text& cell) const { return cell.text; }
  std::string operator()(const Number& cell) const { return cell.digits; }
  std::string operator()(long cell) const { return std::to_string(cell); }
  std::string operator()(const std::vector<long>& cell) const {
    std::string joined;
    for (const long element : cell) joined += (joined.empty() ? "" : " ") + std::to_string(element);
    return joined;
  }
};

}  // namespace

Document document_of(const EncloseReport& report) { return document("enclose", report); }
Document document_of(const CertificateReport& report) { return document("certificate", report); }
Document document_of(const QuickReport& report) { return document("quick", report); }
Document document_of(const ComparisonReport& report) { return document("comparison", report); }

std::string plain(const Cell& cell) { return std::visit(PlainText{}, cell); }

}  // namespace heraldgauge::reports
