// The written forms, byte for byte, as a reader of a report sees them.

#include <gtest/gtest.h>

#include <clocale>
#include <locale>

#include "reports/writer.hpp"
#include "tests/reports/sample_reports.hpp"
#include "tests/support/process.hpp"

namespace heraldgauge::test {
namespace {

using reports::Format;
using reports::write;

std::string golden(const std::string& name) {
  return contents_of(std::string(HERALDGAUGE_SOURCE_DIR) + "/tests/reports/golden/" + name);
}

void expect_all_as_written() {
  const reports::EncloseReport enclose = sample_enclose_report();
  EXPECT_EQ(write(enclose, Format::json), golden("enclose.json"));
  EXPECT_EQ(write(enclose, Format::csv), golden("enclose.csv"));
  EXPECT_EQ(write(enclose, Format::text), golden("enclose.txt"));
  EXPECT_EQ(write(enclose, Format::text, {60}), golden("enclose-narrow.txt"));
  const reports::QuickReport quick = sample_quick_report();
  EXPECT_EQ(write(quick, Format::json), golden("quick.json"));
  EXPECT_EQ(write(quick, Format::csv), golden("quick.csv"));
  EXPECT_EQ(write(quick, Format::text), golden("quick.txt"));
  const reports::ListReport list = sample_list_report();
  EXPECT_EQ(write(list, Format::json), golden("list.json"));
  EXPECT_EQ(write(list, Format::csv), golden("list.csv"));
  EXPECT_EQ(write(list, Format::text), golden("list.txt"));
  EXPECT_EQ(write(sample_certificate_report()), golden("certificate.json"));
}

struct CommaPunctuation : std::numpunct<char> {
  char do_decimal_point() const override { return ','; }
  char do_thousands_sep() const override { return '.'; }
  std::string do_grouping() const override { return "\1"; }
};

TEST(Writers, PrintTheGoldenForms) { expect_all_as_written(); }

TEST(Writers, DoNotChangeUnderALocaleWithDecimalCommas) {
  const std::locale before = std::locale::global(std::locale(std::locale::classic(), new CommaPunctuation));
  std::setlocale(LC_ALL, "de_DE.UTF-8");  // where it is installed
  expect_all_as_written();
  std::setlocale(LC_ALL, "C");
  std::locale::global(before);
}

}  // namespace
}  // namespace heraldgauge::test
