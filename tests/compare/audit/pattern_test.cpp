// Causes that are patterns: differences planted by arithmetic on exact values.

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <functional>

#include "fast/evaluate.hpp"
#include "reference/arithmetic/decimal.hpp"
#include "tests/compare/audit/audited.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {
namespace {

using model::Rational;

const std::string link =
    "chain.stations = 0\nsource.pair_parameter = 0.1\nchannel.transmittance = 0.5\nend.detector.efficiency = 0.5\n"
    "end.detector.dark_probability = 1e-4\n";
constexpr int rows = 30;

Rational parameter(int row) { return Rational(row + 1) / 100; }

Rational gain_at(const Rational& lam) {
  const auto scenario = model::read_scenario(link, "link");
  reference::Request request;
  request.quantities = {{model::QuantityKind::gain}};
  const auto results = reference::enclose(*model::chain_with(*scenario, {{"source.pair_parameter", lam}}), request);
  return results->front().enclosure->lower;
}

// The table of gain over lam with each exact value replaced, and its causes.
std::vector<reports::Cause> causes_of(const std::function<Rational(int row, const Rational& exact)>& replaced,
                                      int digits, std::string* note = nullptr) {
  std::string table = "source.pair_parameter,gain\n";
  for (int row = 0; row < rows; ++row) {
    table += model::exact_text(parameter(row)) + "," +
             reference::decimal(replaced(row, gain_at(parameter(row))), digits, reference::Direction::nearest) + "\n";
  }
  const Audited result = audited(link, table);
  if (note != nullptr) *note = result.answer.conclusion.causes_note;
  return result.answer.conclusion.causes;
}

const reports::Cause* find(const std::vector<reports::Cause>& causes, const std::string& id) {
  const auto found =
      std::find_if(causes.begin(), causes.end(), [&](const reports::Cause& one) { return one.cause == id; });
  return found == causes.end() ? nullptr : &*found;
}

void expect_first(const std::vector<reports::Cause>& causes, const std::string& id, const std::string& setting) {
  ASSERT_FALSE(causes.empty()) << id;
  EXPECT_EQ(causes[0].cause, id);
  EXPECT_EQ(causes[0].setting, setting);
  EXPECT_EQ(causes[0].explains, "1");
}

TEST(Pattern, FindsAConstantFactor) {
  expect_first(causes_of([](int, const Rational& x) -> Rational { return x * 37 / 10; }, 10), "constant-factor", "3.7");
  expect_first(causes_of([](int, const Rational& x) -> Rational { return x * 1000; }, 10), "constant-factor", "1000");
}

TEST(Pattern, FindsAConstantOffset) {
  expect_first(causes_of([](int, const Rational& x) -> Rational { return x + Rational(1) / 400; }, 10),
               "constant-offset", "0.0025");
}

TEST(Pattern, FindsAStretchedOrDisplacedAxis) {
  const auto stretched = [](int row, const Rational&) { return gain_at(parameter(row) * 27 / 20); };
  expect_first(causes_of(stretched, 10), "axis-factor", "source.pair_parameter times 1.35");
  const auto displaced = [](int row, const Rational&) { return gain_at(parameter(row) + Rational(3) / 1000); };
  expect_first(causes_of(displaced, 10), "axis-offset", "source.pair_parameter plus 0.003");
}

TEST(Pattern, FindsDisplacedRows) {
  // The axis displaced by one step of 0.01 is the same table.
  const auto causes = causes_of([](int row, const Rational&) { return gain_at(parameter(row + 1)); }, 10);
  ASSERT_FALSE(causes.empty());
  const bool named =
      find(causes, "shifted-rows") != nullptr || causes[0].same_as == std::vector<std::string>{"axis-offset"};
  EXPECT_TRUE(named) << causes[0].cause;
}

TEST(Pattern, FindsRoundOffOfBinary32) {
  const auto causes = causes_of([](int, const Rational& x) { return Rational(static_cast<float>(x.get_d())); }, 12);
  ASSERT_NE(find(causes, "round-off"), nullptr);
  EXPECT_EQ(causes[0].kind, "pattern");
}

TEST(Pattern, FindsSimulatedTrials) {
  Random random(5);
  constexpr int trials = 20000;
  const auto sampled = [&](int, const Rational& x) -> Rational {
    std::binomial_distribution<int> events(trials, x.get_d());
    return Rational(events(random)) / trials;
  };
  const auto causes = causes_of(sampled, 6);
  ASSERT_NE(find(causes, "shot-sampling"), nullptr);
  const double found = std::stod(find(causes, "shot-sampling")->setting->substr(6));
  EXPECT_GT(found, trials / 2.5);
  EXPECT_LT(found, trials * 2.5);
}

TEST(Pattern, SaysWhereNothingFits) {
  std::string note;
  const auto causes =
      causes_of([](int row, const Rational& x) -> Rational { return x * (2 + row * row % 7); }, 10, &note);
  EXPECT_TRUE(causes.empty()) << causes[0].cause;
  EXPECT_NE(note.find("Nothing fits"), std::string::npos);
}

// Where a key rate vanishes, 17 right digits of a binary64 code are not right to 1e-12 of so small a number.
TEST(Pattern, RoundingWhereAKeyRateVanishesIsNoCause) {
  const std::string trunk =
      "chain.stations = 3\nsource.pair_parameter = 0.01\nstation.detector.efficiency = 0.5\n"
      "station.detector.dark_probability = 1e-6\nend.detector.efficiency = 0.5\n"
      "end.detector.dark_probability = 1e-6\nchannel.transmittance = 0.5\n";
  const auto scenario = model::read_scenario(trunk, "trunk");
  std::string table = "channel.transmittance,key_rate\n";
  for (int row = 0; row < 60; ++row) {
    const Rational transmittance(520000 + 100 * row, 1000000);
    const auto chain = model::chain_with(*scenario, {{"channel.transmittance", transmittance}});
    const fast::Value value = fast::evaluate(*chain, {{model::QuantityKind::key_rate}}).front();
    table +=
        reference::decimal(transmittance, 6, reference::Direction::nearest) + "," + fast::decimal(value.value) + "\n";
  }
  const reports::AuditConclusion conclusion = audited(trunk, table).answer.conclusion;
  EXPECT_GT(conclusion.summary.counts.differs, 0U) << "the table has to show it";
  EXPECT_TRUE(conclusion.causes.empty()) << conclusion.causes[0].cause;
  EXPECT_NE(conclusion.causes_note.find("small rest"), std::string::npos) << conclusion.causes_note;
}

}  // namespace
}  // namespace heraldgauge::test
