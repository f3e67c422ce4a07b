// The binary64 evaluator as the program answers it.

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "reference/model/exact_number.hpp"
#include "tests/cli/program.hpp"

namespace heraldgauge::test {
namespace {

using model::Rational;
using nlohmann::json;

Rational number(const json& text) { return *model::parse_exact(text.get<std::string>()); }

std::string asking_nothing() {
  const std::string scenario = small_scenario();
  return scenario.substr(0, scenario.find("ask.quantities"));
}

json results_of(const std::string& command) {
  const ProcessResult result = heraldgauge({command, "-", "--format", "json"}, asking_nothing());
  EXPECT_EQ(result.status, 0) << result.err;
  return json::parse(result.out)["points"][0]["results"];
}

// The bound of a key is relative to gain * sifting, not to the value.
bool is_key(const json& result) { return result["quantity"] == "key_fraction" || result["quantity"] == "key_rate"; }

TEST(Quick, LiesWithinItsOwnBoundOfTheCertifiedValue) {
  const json certified = results_of("enclose");
  const json quick = results_of("quick");
  ASSERT_EQ(certified.size(), quick.size());
  const Rational certified_width("1/1000000000000000000000000000000");
  for (std::size_t i = 0; i < quick.size(); ++i) {
    SCOPED_TRACE(quick[i].dump());
    ASSERT_EQ(quick[i]["quantity"], certified[i]["quantity"]);
    ASSERT_EQ(quick[i]["status"], "computed");
    if (is_key(quick[i])) continue;
    const Rational exact = number(certified[i]["value"]);
    EXPECT_LE(abs(number(quick[i]["value"]) - exact),
              abs(exact) * (number(quick[i]["relative_error_bound"]) + certified_width));
    EXPECT_LT(number(quick[i]["relative_error_bound"]), Rational(1, 1000000000));
  }
}

}  // namespace
}  // namespace heraldgauge::test
