#pragma once
// Test results as the XML that continuous integration systems read: testsuites, testsuite, testcase, failure, error,
// skipped.

#include <map>
#include <string>
#include <vector>

#include "reports/record/audit.hpp"

namespace heraldgauge::reports {

// Gathers an audit: one suite a quantity and one case a row; above 10 000 rows one case a quantity and verdict, which
// keeps the file small. A number that differs or is impossible is a failure, one that is unreadable or undecided an
// error; where the quantity is undefined at a point nothing is tested, so the case is skipped.
class CiResults {
 public:
  explicit CiResults(std::string name) : name_(std::move(name)) {}
  void add(const AuditPoint& point);
  std::string xml() const;

  static constexpr std::size_t most_rows = 10000;

 private:
  struct Case {
    std::string name;
    std::string outcome;  // of the verdicts, or "skipped"
    std::string message;
  };
  struct Suite {
    std::vector<Case> cases;
    std::map<std::string, std::size_t> counts;  // by outcome
  };

  std::string name_;
  std::size_t rows_ = 0;
  std::map<std::string, Suite> suites_;
};

// Text for an XML 1.0 attribute or element: markup escaped, characters that XML forbids and bytes that are not UTF-8
// dropped.
std::string xml_text(const std::string& text);

}  // namespace heraldgauge::reports
