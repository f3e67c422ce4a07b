// Test results in the XML of continuous integration: the element and attribute names that such systems read (common
// practice; there is no standard), and what XML 1.0 allows as a character (section 2.2 of the recommendation).

#include <gtest/gtest.h>

#include <set>

#include "reports/ci_xml.hpp"

namespace heraldgauge::test {
namespace {

using reports::AuditPoint;
using reports::AuditResult;
using reports::CiResults;

AuditPoint point(std::size_t row, const std::string& verdict) {
  AuditResult result;
  result.quantity = "gain";
  result.given = "0.5";
  if (verdict != "undefined") result.lower = result.upper = "0.25";
  result.verdict = verdict == "undefined" ? "undecided" : verdict;
  return {row, 1, {{"chain.stations", "1"}}, {result}};
}

std::size_t count(const std::string& text, const std::string& part) {
  std::size_t found = 0;
  for (std::size_t at = text.find(part); at != std::string::npos; at = text.find(part, at + 1)) ++found;
  return found;
}

TEST(CiXml, CountsEachKindOfOutcome) {
  CiResults results("link & <audit>");
  std::size_t row = 0;
  for (const char* verdict : {"agrees", "differs", "impossible", "unreadable", "undecided", "undefined"})
    results.add(point(++row, verdict));
  const std::string xml = results.xml();
  EXPECT_EQ(xml.find("<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<testsuites name=\"link &amp; &lt;audit&gt;\" "
                     "tests=\"6\" failures=\"2\" "
                     "errors=\"2\" skipped=\"1\">"),
            0u)
      << xml;
  EXPECT_EQ(count(xml, "<testcase "), 6u);
  EXPECT_EQ(count(xml, "<failure type=\"differs\""), 1u);
  EXPECT_EQ(count(xml, "<failure type=\"impossible\""), 1u);
  EXPECT_EQ(count(xml, "<error type=\"unreadable\""), 1u);
  EXPECT_EQ(count(xml, "<skipped message="), 1u);
  EXPECT_EQ(count(xml, "certified in [0.25, 0.25]"), 4u);
}

TEST(CiXml, GivesUniqueNamesEvenOnOneLine) {
  CiResults results("one line");
  for (std::size_t row = 1; row <= 50; ++row) results.add(point(row, "agrees"));
  const std::string xml = results.xml();
  std::set<std::string> names;
  for (std::size_t at = xml.find(" name=\"row"); at != std::string::npos; at = xml.find(" name=\"row", at + 1)) {
    names.insert(xml.substr(at, xml.find('"', at + 8) - at));
  }
  EXPECT_EQ(names.size(), 50u);
}

TEST(CiXml, AggregatesLargeTables) {
  CiResults results("large");
  for (std::size_t row = 1; row <= CiResults::most_rows; ++row) results.add(point(row, "agrees"));
  EXPECT_EQ(count(results.xml(), "<testcase "), CiResults::most_rows);
  results.add(point(CiResults::most_rows + 1, "differs"));
  const std::string xml = results.xml();
  EXPECT_EQ(count(xml, "<testcase "), 2u);
  EXPECT_NE(xml.find("tests=\"2\" failures=\"1\""), std::string::npos);
  EXPECT_NE(xml.find("10000 numbers: agrees"), std::string::npos);
}

TEST(CiXml, DropsWhatXmlForbids) {
  EXPECT_EQ(reports::xml_text(std::string("a\0\x01\x1f"
                                          "b\t\n",
                                          7)),
            "ab&#9;&#10;");
  EXPECT_EQ(reports::xml_text("\xC3\xA9\xC3\x28\xED\xA0\x80\xEF\xBF\xBF\xF0\x9F\x98\x80"), "\xC3\xA9(\xF0\x9F\x98\x80");
  EXPECT_EQ(reports::xml_text("<&>\"'"), "&lt;&amp;&gt;&quot;'");
}

}  // namespace
}  // namespace heraldgauge::test
