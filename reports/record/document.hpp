#pragma once
// The common shape of every report that has points: named cells in rows, rows under points. Each record is brought into
// it once, so a writer knows nothing of the commands.

#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "reports/record/results.hpp"

namespace heraldgauge::reports {

struct Absent {};
struct Text {
  std::string text;
};
struct Number {
  std::string digits;  // a decimal or fraction that is a result
};
using Cell = std::variant<Absent, Text, Number, long, std::vector<long>>;

struct Field {
  std::string_view name;
  Cell cell;
};

using Row = std::vector<Field>;

struct Point {
  Parameters parameters;
  std::vector<Row> rows;  // all with the same names in the same order
};

struct Document {
  std::string_view command;
  std::string title;
  std::vector<Point> points;  // at least one
};

Document document_of(const EncloseReport& report);
Document document_of(const CertificateReport& report);
Document document_of(const QuickReport& report);
Document document_of(const ComparisonReport& report);

// A cell as plain text; empty where absent, a list as its elements with blanks between them.
std::string plain(const Cell& cell);

}  // namespace heraldgauge::reports
