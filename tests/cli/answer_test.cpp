// What the commands answer: shapes, values that are known otherwise, the same bytes whatever the threads and locale.

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "reference/model/exact_number.hpp"
#include "tests/cli/program.hpp"
#include "tests/support/json_schema.hpp"

namespace heraldgauge::test {
namespace {

using model::Rational;
using nlohmann::json;

json answer_to(std::vector<std::string> arguments, const std::string& scenario) {
  arguments.insert(arguments.end(), {"--format", "json"});
  const ProcessResult result = heraldgauge(arguments, scenario);
  EXPECT_EQ(result.status, 0) << result.err;
  return json::parse(result.out);
}

json first_result(const json& answer) { return answer["points"][0]["results"][0]; }

Rational number(const json& text) { return *model::parse_exact(text.get<std::string>()); }

std::string sweep_scenario() {
  return small_scenario() +
         "[[sweep]]\nkey = \"channel.transmittance\"\nvalues = [0.125, 0.25, 0.5, 1]\n"
         "[[sweep]]\nkey = \"chain.stations\"\nvalues = [0, 1, 2]\n";
}

TEST(Enclose, GivesBoundsWithinTheAskedWidthThatHoldTheValue) {
  for (const int digits : {1, 5, 30, 200}) {
    const json result = first_result(answer_to({"enclose", "-", "--digits", std::to_string(digits)}, small_scenario()));
    const Rational lower = number(result["lower"]);
    const Rational upper = number(result["upper"]);
    const Rational value = number(result["value"]);
    EXPECT_TRUE(lower <= value && value <= upper);
    Rational width = upper - lower;
    for (int i = 0; i < digits; ++i) width *= 10;
    EXPECT_LE(width, abs(value));
    EXPECT_EQ(result["status"], "certified");
    EXPECT_GE(result["digits"], std::min(digits, 99));
  }
}

TEST(Enclose, GivesBoundsThatHoldTheExactFraction) {
  const TemporaryFolder folder;
  const json result =
      first_result(answer_to({"enclose", "-", "--exact", "--certificate", folder.file("how.json")}, small_scenario()));
  const Rational exact = number(result["exact"]);
  EXPECT_TRUE(number(result["lower"]) <= exact && exact <= number(result["upper"]));
  EXPECT_TRUE(result["precision_bits"].is_null());
  EXPECT_EQ(result["digits"], 99);
  const json certificate = json::parse(contents_of(folder.file("how.json")));
  EXPECT_EQ(first_result(certificate)["lower"], result["exact"]);
  EXPECT_EQ(first_result(certificate)["upper"], result["exact"]);
}

TEST(Enclose, GivesACertificateWhoseBoundsAreInsideThePrintedOnes) {
  const TemporaryFolder folder;
  const json result = first_result(
      answer_to({"enclose", "-", "--digits", "20", "--certificate", folder.file("how.json")}, small_scenario()));
  const std::string text = contents_of(folder.file("how.json"));
  EXPECT_EQ(schema_faults("certificate", text), "");
  const json certified = first_result(json::parse(text));
  EXPECT_LE(number(result["lower"]), number(certified["lower"]));
  EXPECT_LE(number(certified["lower"]), number(certified["upper"]));
  EXPECT_LE(number(certified["upper"]), number(result["upper"]));
}

TEST(Enclose, GivesTheRationalQuantitiesWhereExactValuesAreAskedForAndNothingElse) {
  std::string scenario = small_scenario();
  scenario.erase(scenario.find("ask.quantities"));
  const json answer = answer_to({"enclose", "-", "--exact"}, scenario);
  std::vector<std::string> names;
  for (const json& result : answer["points"][0]["results"]) names.push_back(result["quantity"]);
  EXPECT_EQ(names.size(), 21U);  // all but the pattern, visibilities, keys and capacities
  EXPECT_EQ(std::count(names.begin(), names.end(), "gain"), 1);
  EXPECT_EQ(std::count(names.begin(), names.end(), "key_rate"), 0);
}

TEST(Answers, FitTheirSchemas) {
  for (const std::string command : {"enclose", "quick"}) {
    const ProcessResult result = heraldgauge({command, "-", "--format", "json"}, sweep_scenario());
    EXPECT_EQ(schema_faults(command, result.out), "");
  }
  for (const std::string subject : {"quantities", "shortcuts", "conventions", "keys"}) {
    const ProcessResult result = heraldgauge({"list", subject, "--format", "json"});
    EXPECT_EQ(schema_faults("list", result.out), "");
  }
}

TEST(Answers, CoverTheProductOfSweepsTheFirstVaryingSlowest) {
  const json answer = answer_to({"enclose", "-"}, sweep_scenario());
  ASSERT_EQ(answer["points"].size(), 12U);
  EXPECT_EQ(answer["points"][0]["parameters"], json({{"channel.transmittance", "0.125"}, {"chain.stations", "0"}}));
  EXPECT_EQ(answer["points"][1]["parameters"], json({{"channel.transmittance", "0.125"}, {"chain.stations", "1"}}));
  EXPECT_EQ(answer["points"][11]["parameters"], json({{"channel.transmittance", "1"}, {"chain.stations", "2"}}));
  EXPECT_EQ(answer["points"][0]["results"][0]["value"], "1");  // no station: the herald is certain
}

TEST(Answers, AreTheSameBytesForAnyNumberOfThreads) {
  for (const std::string command : {"enclose", "quick"}) {
    const std::string one = heraldgauge({command, "-", "--threads", "1"}, sweep_scenario()).out;
    EXPECT_NE(one, "");
    for (const std::string threads : {"2", "8"}) {
      EXPECT_EQ(heraldgauge({command, "-", "--threads", threads}, sweep_scenario()).out, one);
    }
  }
}

TEST(Answers, AreTheSameBytesUnderALocaleWithDecimalCommas) {
  ProcessOptions german;
  german.input = sweep_scenario();
  german.environment = {"LC_ALL=de_DE.UTF-8"};
  for (const std::string format : {"text", "json", "csv"}) {
    EXPECT_EQ(heraldgauge({"quick", "-", "--format", format}, german).out,
              heraldgauge({"quick", "-", "--format", format}, sweep_scenario()).out);
  }
}

TEST(Answers, HaveOneCsvRowAPointAndQuantity) {
  const ProcessResult result = heraldgauge(
      {"enclose", "-", "--format", "csv", "--quantity", "herald_probability", "--quantity", "gain"}, sweep_scenario());
  EXPECT_EQ(line_count(result.out), 1 + 12 * 2);
  EXPECT_EQ(result.out.substr(0, result.out.find("\r\n")),
            "channel.transmittance,chain.stations,quantity,status,reason,value,lower,upper,exact,digits,route,cutoff,"
            "tail_bound,precision_bits");
}

TEST(Answers, ChangeWithSet) {
  const json changed =
      answer_to({"enclose", "-", "--set", "chain.stations=0", "--set", "title=other"}, small_scenario());
  EXPECT_EQ(changed["scenario"], "other");
  EXPECT_EQ(first_result(changed)["value"], "1");
  const ProcessResult swept = heraldgauge({"enclose", "-", "--set", "chain.stations=0"}, sweep_scenario());
  EXPECT_EQ(swept.status, 2);
}

TEST(List, NamesAnIdAndASentenceALine) {
  const ProcessResult quantities = heraldgauge({"list", "quantities"});
  EXPECT_EQ(quantities.status, 0);
  EXPECT_EQ(line_count(quantities.out), 15);
  EXPECT_EQ(quantities.out.rfind("herald_probability ", 0), 0U);
  EXPECT_NE(heraldgauge({"list", "keys"}).out.find("\nchannel.length_km "), std::string::npos);
}

TEST(Help, NamesCommandsAndExamples) {
  const ProcessResult help = heraldgauge({"--help"});
  EXPECT_EQ(help.status, 0);
  for (const char* part : {"enclose", "quick", "list", "Examples:"}) {
    EXPECT_NE(help.out.find(part), std::string::npos);
  }
  EXPECT_NE(heraldgauge({"enclose", "--help"}).out.find("--certificate"), std::string::npos);
  EXPECT_EQ(heraldgauge({"--version"}).out.rfind("heraldgauge ", 0), 0U);
}

}  // namespace
}  // namespace heraldgauge::test
