// The readers of tables: what they accept (RFC 4180; RFC 8259 arrays of flat objects), what they refuse, and where.

#include <gtest/gtest.h>

#include <algorithm>

#include "compare/table/row.hpp"
#include "reference/model/fault.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {
namespace {

using compare::ByteSource;
using Cells = std::vector<std::string>;

class Recorder : public compare::RowConsumer {
 public:
  std::optional<model::Fault> columns(const Cells& names) override {
    header = names;
    return std::nullopt;
  }
  std::optional<model::Fault> row(compare::TableRow&& row) override {
    rows.push_back(row.cells);
    lines.push_back(row.line);
    return std::nullopt;
  }
  Cells header;
  std::vector<Cells> rows;
  std::vector<std::size_t> lines;
};

// A source that gives `size` bytes at a time.
ByteSource in_pieces(const std::string& text, std::size_t size) {
  return [all = compare::bytes_of(text), size](char* buffer, std::size_t room) {
    return all(buffer, std::min(size, room));
  };
}

Recorder read(const std::string& text, std::size_t piece = 1000) {
  Recorder recorder;
  const auto fault = compare::read_table(in_pieces(text, piece), "t", recorder);
  EXPECT_FALSE(fault) << (fault ? model::describe(*fault) : "") << "\n" << text;
  return recorder;
}

std::string refusal(const std::string& text) {
  Recorder recorder;
  const auto fault = compare::read_table(in_pieces(text, 1000), "t", recorder);
  return fault ? model::describe(*fault) : "";
}

void expect_refusal(const std::string& text, const std::string& part) {
  const std::string line = refusal(text);
  EXPECT_NE(line.find(part), std::string::npos) << "'" << line << "' for " << text;
}

TEST(CsvTable, AcceptsMarksLineEndsAndQuotes) {
  for (const std::size_t piece : {1, 2, 3, 1000}) {
    const Recorder table = read("\xEF\xBB\xBFgain,note\r\n0.5,\"a, \"\"b\"\"\r\nc\"\r\n0.25,\n", piece);
    EXPECT_EQ(table.header, (Cells{"gain", "note"}));
    EXPECT_EQ(table.rows, (std::vector<Cells>{{"0.5", "a, \"b\"\r\nc"}, {"0.25", ""}}));
    EXPECT_EQ(table.lines, (std::vector<std::size_t>{2, 4}));
  }
  EXPECT_EQ(read("gain\n1\n2").rows, (std::vector<Cells>{{"1"}, {"2"}}));
  EXPECT_EQ(read("a,b\n1,2\n\n\r\n").rows.size(), 1u);
}

TEST(CsvTable, RefusesWithLineAndByte) {
  expect_refusal("", "t:1: the table is empty");
  expect_refusal("a,a\n1,2\n", "t:1: the column 'a' stands twice");
  expect_refusal("a,,b\n", "column 2 has no name");
  expect_refusal("a,b\n1,2\n3\n", "t:3: the row has 1 cells, the header 2 (byte 8)");
  expect_refusal("a,b\n1,2,3\n", "are decimals written with a comma?");
  expect_refusal("a;b\n1;2\n", "semicolons");
  expect_refusal("a,b\n1,\"2\n3,4\n", "t:2: a quote that is never closed (byte 6)");
  expect_refusal("a,b\n1,2\"\n", "a quote inside a cell that does not start with one (byte 7)");
  expect_refusal("a,b\n1,\"2\"x\n", "text after a closing quote");
  expect_refusal("a,b\r1,2\r", "carriage return without a line feed");
  expect_refusal("a,b\n\n1,2\n", "t:2: an empty line among the rows");
  expect_refusal("a\n\xC3\x28\n", "no text in UTF-8 (byte 2)");
  expect_refusal("a\n\xED\xA0\x80\n", "no text in UTF-8");
  expect_refusal(std::string("a\n1\0\n", 5), "no text in UTF-8 (byte 3)");
  expect_refusal("a\n" + std::string(compare::longest_cell + 1, '1') + "\n", "is a quote left open?");
}

TEST(CsvTable, ReadsBackWhatWasQuoted) {
  const std::vector<std::string> pieces = {"", "a", ",", "\"", "\n", "\r\n", " ", "0.1", "\xC3\xA9", "\"\""};
  for_each_case(200, 11, [&](Random& random) {
    std::vector<Cells> rows(1 + random() % 5, Cells(1 + random() % 4));
    for (Cells& row : rows) row.resize(rows[0].size());
    std::string text;
    for (std::size_t c = 0; c < rows[0].size(); ++c) text += (c > 0 ? ",x" : "x") + std::to_string(c);
    text += "\n";
    for (Cells& row : rows) {
      for (std::size_t c = 0; c < row.size(); ++c) {
        for (std::size_t i = random() % 4; i > 0; --i) row[c] += pieces[random() % pieces.size()];
        std::string quoted = "\"";
        for (const char byte : row[c]) quoted += byte == '"' ? "\"\"" : std::string(1, byte);
        text += (c > 0 ? "," : "") + quoted + "\"";
      }
      text += random() % 2 == 0 ? "\n" : "\r\n";
    }
    const bool blank_allowed = rows[0].size() == 1;
    const bool has_blank = std::any_of(rows.begin(), rows.end(), [](const Cells& row) { return row == Cells{""}; });
    if (blank_allowed && has_blank) return;
    EXPECT_EQ(read(text, 1 + random() % 7).rows, rows) << text;
  });
}

TEST(JsonTable, KeepsTheDigitsOfNumbers) {
  for (const std::size_t piece : {1, 3, 1000}) {
    const Recorder table =
        read("\xEF\xBB\xBF [ {\"a\": 1.2300e-5, \"b\": 7},\n {\"b\": null, \"a\": \"1e460\"} ]\n", piece);
    EXPECT_EQ(table.header, (Cells{"a", "b"}));
    EXPECT_EQ(table.rows, (std::vector<Cells>{{"1.2300e-5", "7"}, {"1e460", ""}}));
  }
  EXPECT_EQ(read("[{\"a\": 0.1000000000000000055511151231257827021181583404541015625}]").rows[0][0],
            "0.1000000000000000055511151231257827021181583404541015625");
}

TEST(JsonTable, Refuses) {
  expect_refusal("[]", "the table is empty");
  expect_refusal("[{}]", "an object without members");
  expect_refusal("{\"a\": 1}", "an object instead of an array");
  expect_refusal("[{\"a\": 1, \"a\": 2}]", "the member 'a' stands twice");
  expect_refusal("[{\"a\": 1},\n {\"b\": 2}]", "t:2: a member 'b' that the first row has not");
  expect_refusal("[{\"a\": 1, \"b\": 1}, {\"b\": 2}]", "a row without 'a'");
  expect_refusal("[{\"a\": [1]}]", "a member that is an array");
  expect_refusal("[{\"a\": {}}]", "a member that is an object");
  expect_refusal("[1]", "a value where a row is expected");
  expect_refusal("[{\"a\": NaN}]", "it is not JSON");
  expect_refusal("[{\"a\": 1}] x", "it is not JSON");
  expect_refusal("[{\"a\": 1}", "it is not JSON");
  expect_refusal("[{\"a\": 1e400}]", "such a number in quotes");
}

TEST(Table, ReportsAReadThatFails) {
  for (const std::string start : {"gain\n0.5\n", "[{\"gain\": 0.5},"}) {
    Recorder recorder;
    const ByteSource source = [all = compare::bytes_of(start)](char* buffer, std::size_t size) {
      const long count = all(buffer, size);
      return count > 0 ? count : -1;
    };
    const auto fault = compare::read_table(source, "t", recorder);
    ASSERT_TRUE(fault);
    EXPECT_NE(model::describe(*fault).find("cannot be read to its end"), std::string::npos);
  }
}

}  // namespace
}  // namespace heraldgauge::test
