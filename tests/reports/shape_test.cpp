// What must hold whatever the record: the published schemas, strict JSON, CSV that other readers give back unchanged.

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "reports/writer.hpp"
#include "tests/reports/sample_reports.hpp"
#include "tests/support/effort.hpp"
#include "tests/support/json_schema.hpp"
#include "tests/support/process.hpp"

namespace heraldgauge::test {
namespace {

using nlohmann::json;
using reports::Format;
using reports::write;

// Reads CSV with the csv module of Python, a second implementation of the format.
json rows_read_by_python(const std::string& csv) {
  const std::string program =
      "import csv, io, json, sys\n"
      "text = sys.stdin.buffer.read().decode('utf-8')\n"
      "print(json.dumps(list(csv.reader(io.StringIO(text, newline=''), strict=True))))\n";
  ProcessOptions options;
  options.input = csv;
  const ProcessResult result = run_process({"/usr/bin/python3", "-c", program}, options);
  EXPECT_EQ(result.status, 0) << result.err;
  return json::parse(result.out);
}

reports::EncloseReport report_with_parameter(const std::string& text) {
  reports::EncloseReport report = sample_enclose_report();
  report.points.resize(1);
  report.points[0].parameters[0].second = text;
  return report;
}

std::string cell_written_for(const std::string& text) {
  return rows_read_by_python(write(report_with_parameter(text), Format::csv))[1][0];
}

TEST(Json, FitsThePublishedSchemas) {
  EXPECT_EQ(schema_faults("enclose", write(sample_enclose_report(), Format::json)), "");
  EXPECT_EQ(schema_faults("quick", write(sample_quick_report(), Format::json)), "");
  EXPECT_EQ(schema_faults("list", write(sample_list_report(), Format::json)), "");
  EXPECT_EQ(schema_faults("certificate", write(sample_certificate_report())), "");
}

TEST(Json, SchemasRefuseWhatTheyShould) {
  json answer = json::parse(write(sample_enclose_report(), Format::json));
  answer["points"][0]["results"][0]["value"] = 1.25;  // a result that is not a string
  EXPECT_NE(schema_faults("enclose", answer.dump()), "");
  answer["points"][0]["results"][0]["value"] = nullptr;  // certified without a value
  EXPECT_NE(schema_faults("enclose", answer.dump()), "");
  EXPECT_NE(schema_faults("enclose", "{\"schema\": NaN}"), "");
}

TEST(Json, StaysValidWithTextThatIsNotUtf8) {
  reports::EncloseReport report = sample_enclose_report();
  report.title = "\xff\xfe broken";
  EXPECT_EQ(schema_faults("enclose", write(report, Format::json)), "");
}

TEST(Json, GivesEveryRowTheSameKeys) {
  const json answer = json::parse(write(sample_enclose_report(), Format::json));
  std::vector<std::string> keys;
  for (const auto& [key, value] : answer["points"][0]["results"][0].items()) keys.push_back(key);
  for (const json& point : answer["points"]) {
    for (const json& result : point["results"]) {
      std::vector<std::string> found;
      for (const auto& [key, value] : result.items()) found.push_back(key);
      EXPECT_EQ(found, keys);
    }
  }
}

TEST(Csv, MarksTextThatASpreadsheetWouldRun) {
  for (const std::string text : {"=1+1", "+cmd", "-2+3", "@SUM(A1)", "\tx", "\rx"}) {
    EXPECT_EQ(cell_written_for(text), "'" + text);
  }
}

TEST(Csv, LeavesNumbersAndOrdinaryTextAlone) {
  for (const std::string text :
       {"-1.5", "+7", "-3/7", "-2.5e-7", "psi+", "", "a\"b", "a,b", "two\r\nlines", "'quoted"}) {
    EXPECT_EQ(cell_written_for(text), text);
  }
}

TEST(Csv, IsReadBackUnchangedByAnotherReader) {
  for_each_case(5, 20, [](Random& random) {
    const std::string alphabet = "ab,\"\n\r;\t =-+@'1\xc3\xa9";
    reports::ListReport report{"keys", {}};
    for (int i = 0; i < 40; ++i) {
      std::string text = "x";
      for (std::uint64_t length = random() % 12; length > 0; --length)
        text += alphabet[random() % (alphabet.size() - 2)];
      report.entries.push_back({"id" + std::to_string(i), text + "\xc3\xa9", {}});
    }
    const json rows = rows_read_by_python(write(report, Format::csv));
    ASSERT_EQ(rows.size(), report.entries.size() + 1);
    for (std::size_t i = 0; i < report.entries.size(); ++i) EXPECT_EQ(rows[i + 1][1], report.entries[i].sentence);
  });
}

TEST(Text, SaysThatAKeyRateIsNoSecurityProof) {
  const std::string caution = "no security proof";
  EXPECT_NE(write(sample_enclose_report(), Format::text).find(caution), std::string::npos);
  reports::EncloseReport without_key = sample_enclose_report();
  for (auto& point : without_key.points) point.results.pop_back();
  EXPECT_EQ(write(without_key, Format::text).find(caution), std::string::npos);
}

TEST(Text, NeverExceedsTheTerminal) {
  for (const int columns : {40, 60, 80, 120}) {
    const std::string text = write(sample_enclose_report(), Format::text, {columns});
    std::size_t begin = 0;
    for (std::size_t end; (end = text.find('\n', begin)) != std::string::npos; begin = end + 1) {
      const std::string line = text.substr(begin, end - begin);
      const bool is_title = begin == 0;  // may be longer
      EXPECT_TRUE(is_title || line.size() <= static_cast<std::size_t>(columns)) << line;
    }
  }
}

TEST(Text, ShowsControlCharactersHarmlessly) {
  const std::string text = write(sample_enclose_report(), Format::text);
  EXPECT_EQ(text.find('\x1b'), std::string::npos);
  EXPECT_NE(text.find("\\x1b[31m"), std::string::npos);
}

}  // namespace
}  // namespace heraldgauge::test
