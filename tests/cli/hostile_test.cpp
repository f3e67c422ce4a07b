// Input made to hurt: a refusal in good time, never a crash, a hang or half an answer.

#include <gtest/gtest.h>

#include "tests/cli/program.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {
namespace {

void expect_refused_quickly(const std::string& scenario, const std::vector<std::string>& more = {}) {
  ProcessOptions options;
  options.input = scenario;
  options.longest = std::chrono::seconds(20);
  std::vector<std::string> arguments = {"enclose", "-"};
  arguments.insert(arguments.end(), more.begin(), more.end());
  const ProcessResult result = heraldgauge(arguments, options);
  EXPECT_EQ(result.status, 2) << scenario.substr(0, 200);
  EXPECT_EQ(result.out, "");
  EXPECT_GE(line_count(result.err), 1);
  EXPECT_EQ(result.err.find('\x1b'), std::string::npos);
}

std::string repeated(const std::string& text, int times) {
  std::string result;
  for (int i = 0; i < times; ++i) result += text;
  return result;
}

TEST(HostileScenario, IsRefused) {
  const std::vector<std::string> scenarios = {
      "",
      std::string(1, '\0'),
      "\xff\xfe",
      "\xef\xbb\xbf",
      "chain.stations = 99999999999999999999999",
      "chain.stations = -1",
      "chain.stations = 1e999999999",
      small_scenario() + "source.squeezing = 1",
      small_scenario() + "\x1b[2J = 1",
      small_scenario() + "a = " + repeated("[", 100000),
      small_scenario() + "a" + repeated(".a", 20000) + " = 1",
      small_scenario() + "a = \"" + repeated("x", 1000000),
      small_scenario() + "unknown = \"" + repeated("x", 1000000) + "\"",
      small_scenario() + "[[sweep]]\nkey = \"channel.length_km\"\nfrom = 0\nto = 1\npoints = 100000000000",
      small_scenario() + "[[sweep]]\nkey = \"no.such.key\"\nvalues = [1]",
      small_scenario() + "station.detector.dark_probability = nan",
      small_scenario() + "station.detector.dark_probability = inf",
      small_scenario() + "station.detector.dark_probability = \"1/0\"",
      small_scenario() + "station.detector.dark_probability = \"1e-99999\"",
      small_scenario() + "station.detector.dark_probability = 0x1",
  };
  for (const std::string& scenario : scenarios) expect_refused_quickly(scenario);
}

TEST(HostileArguments, AreRefused) {
  for (const std::string value : {"=", "=1", "chain.stations", "chain.stations=[", "chain.stations=\x1b[2J",
                                  "chain.stations=1\nchain.herald=2", "\n=1", "override=1", "sweep=[]"}) {
    expect_refused_quickly(small_scenario(), {"--set", value});
  }
  expect_refused_quickly(small_scenario(), {"--quantity", repeated("q", 100000)});
  expect_refused_quickly(small_scenario(), {"--quantity", "\x1b[2J"});
  expect_refused_quickly(small_scenario(), {"--digits", repeated("9", 100000)});
}

TEST(DamagedScenario, NeverCrashesOrHangs) {
  for_each_case(60, 99, [](Random& random) {
    std::string scenario = small_scenario();
    for (int edits = static_cast<int>(random() % 4) + 1; edits > 0; --edits) {
      const std::size_t at = random() % scenario.size();
      switch (random() % 3) {
        case 0:
          scenario[at] = static_cast<char>(random() % 256);
          break;
        case 1:
          scenario.erase(at, random() % 8);
          break;
        default:
          scenario.insert(at, scenario.substr(random() % scenario.size(), random() % 8));
      }
    }
    ProcessOptions options;
    options.input = scenario;
    const ProcessResult result =
        heraldgauge({"enclose", "-", "--digits", "5", "--quantity", "herald_probability"}, options);
    EXPECT_TRUE(result.status == 0 || result.status == 2) << result.status << "\n" << scenario << "\n" << result.err;
    EXPECT_EQ(result.status == 0, !result.out.empty());
  });
}

}  // namespace
}  // namespace heraldgauge::test
