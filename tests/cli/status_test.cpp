// Exit statuses and the lines that explain them.

#include <gtest/gtest.h>

#include "tests/cli/program.hpp"

namespace heraldgauge::test {
namespace {

// Status 2, nothing on standard output, exactly these many lines of explanation, holding `part`.
void expect_refused(const ProcessResult& result, const std::string& part, long lines = 1) {
  EXPECT_EQ(result.status, 2);
  EXPECT_EQ(result.out, "");
  EXPECT_EQ(line_count(result.err), lines) << result.err;
  EXPECT_NE(result.err.find(part), std::string::npos) << result.err;
}

TEST(Status, IsZeroWhereAllIsDone) {
  const ProcessResult result = heraldgauge({"enclose", "-"}, small_scenario());
  EXPECT_EQ(result.status, 0);
  EXPECT_EQ(result.err, "");
}

TEST(Status, IsZeroForAnUndefinedQuantity) {
  const ProcessResult result = heraldgauge(
      {"enclose", "-", "--set", "source.pair_parameter=0", "--quantity", "gain", "--format", "json"}, small_scenario());
  EXPECT_EQ(result.status, 0);
  EXPECT_NE(result.out.find("\"undefined\""), std::string::npos) << result.out;
}

TEST(Status, IsTwoForUnknownCommandsAndOptions) {
  expect_refused(heraldgauge({}), "subcommand");
  expect_refused(heraldgauge({"frobnicate"}), "frobnicate");
  expect_refused(heraldgauge({"enclose"}), "SCENARIO");
  expect_refused(heraldgauge({"enclose", "-", "--frobnicate"}, small_scenario()), "--frobnicate");
  expect_refused(heraldgauge({"enclose", "-", "surplus"}, small_scenario()), "surplus");
  expect_refused(heraldgauge({"enclose", "-", "--digits"}, small_scenario()), "--digits");
}

TEST(Status, IsTwoForOptionsOfOtherCommands) {
  expect_refused(heraldgauge({"quick", "-", "--digits", "5"}, small_scenario()), "--digits");
  expect_refused(heraldgauge({"list", "keys", "--quantity", "gain"}), "--quantity");
}

TEST(Status, IsTwoForValuesOutOfRange) {
  for (const char* digits : {"0", "-1", "10001", "3.5", "many", "1e99", "nan", "0x10", ""}) {
    expect_refused(heraldgauge({"enclose", "-", std::string("--digits=") + digits}, small_scenario()), "--digits");
  }
  for (const char* option : {"--threads", "--route", "--output", "--certificate", "--quantity", "--format", "--set"}) {
    expect_refused(heraldgauge({"enclose", "-", option, ""}, small_scenario()), option);
  }
  expect_refused(heraldgauge({"enclose", "-", "--threads", "0"}, small_scenario()), "--threads");
  expect_refused(heraldgauge({"enclose", "-", "--route", "scenic"}, small_scenario()), "determinant or pair-number");
  expect_refused(heraldgauge({"enclose", "-", "--format", "runes"}, small_scenario()), "text, json or csv");
  expect_refused(heraldgauge({"list", "nothing"}), "quantities, shortcuts, conventions or keys");
}

TEST(Status, IsTwoWithALineForEachFault) {
  expect_refused(heraldgauge({"enclose", "-", "--digits", "0", "--format", "runes", "--set", "x"}, small_scenario()),
                 "KEY=VALUE", 3);
}

TEST(Status, SuggestsTheQuantityThatWasMeant) {
  expect_refused(heraldgauge({"enclose", "-", "--quantity", "herald_probabilty"}, small_scenario()),
                 "did you mean herald_probability?");
  const ProcessResult far = heraldgauge({"enclose", "-", "--quantity", "zzzzzzzzzz"}, small_scenario());
  expect_refused(far, "zzzzzzzzzz");
  EXPECT_EQ(far.err.find("did you mean"), std::string::npos);
}

TEST(Status, IsTwoWithAPlaceForFaultsOfAScenario) {
  const TemporaryFolder folder;
  write_file(folder.file("link.toml"), small_scenario() + "chain.stations = \n");
  const ProcessResult syntax = heraldgauge({"enclose", folder.file("link.toml")});
  expect_refused(syntax, folder.file("link.toml") + ":9:");
  const ProcessResult values = heraldgauge({"enclose", "-", "--set", "source.pair_parameter=1"}, small_scenario());
  expect_refused(values, "source.pair_parameter");
}

TEST(Status, IsTwoWhereTheScenarioCannotBeRead) {
  const TemporaryFolder folder;
  expect_refused(heraldgauge({"enclose", folder.file("missing.toml")}), "missing.toml");
  expect_refused(heraldgauge({"enclose", folder.path().string()}), "cannot be read");
  expect_refused(heraldgauge({"enclose", "/dev/zero"}), "16 MiB");
}

TEST(Status, IsTwoForAnExactValueOfSomethingIrrational) {
  const ProcessResult result = heraldgauge({"enclose", "-", "--exact", "--quantity", "key_rate"}, small_scenario());
  EXPECT_EQ(result.status, 2);
  EXPECT_EQ(result.out, "");
}

TEST(Status, IsFourWhereTheAnswerCannotBeWritten) {
  ProcessOptions full;
  full.input = small_scenario();
  full.out_file = "/dev/full";
  for (const char* command : {"enclose", "quick"}) {
    const ProcessResult result = heraldgauge({command, "-"}, full);
    EXPECT_EQ(result.status, 4);
    EXPECT_EQ(line_count(result.err), 1) << result.err;
  }
  EXPECT_EQ(heraldgauge({"list", "keys"}, full).status, 4);
  EXPECT_EQ(heraldgauge({"--help"}, full).status, 4);
  EXPECT_EQ(heraldgauge({"enclose", "-", "--output", "/dev/full"}, small_scenario()).status, 4);
  EXPECT_EQ(heraldgauge({"enclose", "-", "--output", "/nonexistent/answer"}, small_scenario()).status, 4);
  EXPECT_EQ(heraldgauge({"enclose", "-", "--certificate", "/dev/full"}, small_scenario()).status, 4);
}

TEST(Status, IsFourWhereMemoryRunsOut) {
  const TemporaryFolder folder;
  write_file(folder.file("long.toml"), small_scenario() + "#" + std::string(15000000, ' '));
  // The least address space, up to 5 MB, in which the program starts: too little for 15 MB of scenario.
  const ProcessResult result = shell(
      "for limit in $(seq 15000 5000 500000); do (ulimit -v $limit; $PROGRAM --version >/dev/null 2>&1) && break; "
      "done\n"
      "ulimit -v $limit; $PROGRAM enclose $FOLDER/long.toml --threads 1",
      folder);
  EXPECT_EQ(result.status, 4) << result.err;
  EXPECT_EQ(result.out, "");
  EXPECT_EQ(result.err, "heraldgauge: out of memory\n");
}

TEST(Status, IsQuietWhereTheReaderLeaves) {
  const TemporaryFolder folder;
  write_file(folder.file("link.toml"), small_scenario());
  const ProcessResult result =
      shell("set -o pipefail; $PROGRAM enclose $FOLDER/link.toml --digits 10000 | true; echo $?", folder);
  EXPECT_EQ(result.out, "0\n");
  EXPECT_EQ(result.err, "");
}

}  // namespace
}  // namespace heraldgauge::test
