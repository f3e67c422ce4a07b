// Damaged scenarios, budgets and tables: each is either read, and then gives numbers, or refused with a place, what is
// wrong and a remedy. Nothing crashes, and nothing takes long.

#include <gtest/gtest.h>

#include <cmath>
#include <ctime>

#include "compare/audit/auditor.hpp"
#include "compare/budget.hpp"
#include "compare/departure.hpp"
#include "tests/support/mutation.hpp"

namespace heraldgauge::test {
namespace {

const std::string scenario_text = R"(title = "damaged"
inputs = "decimal"
[chain]
stations = 1
herald = "either"
[source]
pair_parameter = 0.02
[channel]
length_km = 50.5
attenuation_db_per_km = "1/5"
insertion_loss_db = 0.5
[station]
indistinguishability = 0.95
detector = { efficiency = 0.6, dark_probability = 1e-6, dark_model = "thermal" }
[end.detector]
efficiency = 7.5e-1
dark_probability = 1e-5
[override]
"arm.0.left.transmittance" = 0.4
station.1.detector.cH.efficiency = 0.5
[[sweep]]
key = "source.pair_parameter"
values = [0.01, 0.02, "3/100"]
[ask]
quantities = ["herald_probability", "gain"]
)";

const std::string budget_text = R"(key_rate = { relative = "1e-6" }
gain = { relative = 1e-9, absolute = 1e-15 }
any = { relative = 1e-4 }
[shortcuts.pair-cutoff]
key_rate = { relative = 1e-3 }
)";

const std::string csv_text =
    "channel.length_km,herald_probability,gain,gain.tolerance,remark\r\n"
    "10,1.234e-5,0.01,1e-3,\"a, b\"\r\n20,5.5e-6,0.02,,\"c\"\"d\"\r\n\r\n30,1e-7,3.0e-2,0.5,\r\n";

const std::string json_text =
    R"([{"channel.length_km": 10, "herald_probability": 1.234e-5, "gain": "0.01"},
  {"channel.length_km": 2.0e1, "herald_probability": null, "gain": 0.02}, {"channel.length_km": 30,
   "herald_probability": 0, "gain": 3.0e-2}])";

void expect_helpful(const model::Faults& faults) {
  EXPECT_FALSE(faults.empty());
  for (const model::Fault& fault : faults) {
    const std::string line = model::describe(fault);
    EXPECT_FALSE(fault.location.source.empty()) << line;
    EXPECT_FALSE(fault.wrong.empty()) << line;
    EXPECT_FALSE(fault.allowed.empty()) << line;
    EXPECT_LT(line.size(), 2000U) << line;
  }
}

// Processor time, so that a busy machine does not count.
void expect_quick(const std::string& text, const std::function<void()>& work) {
  constexpr double most_seconds = 5;
  const std::clock_t begin = std::clock();
  work();
  EXPECT_LT(static_cast<double>(std::clock() - begin) / CLOCKS_PER_SEC, most_seconds) << text;
}

bool is_small(const model::Chain& chain) { return chain.station_count() <= 2; }

void expect_numbers(const compare::Case& point) {
  std::vector<model::Quantity> quantities;
  for (const char* name : {"herald_probability", "gain", "qber_diagonal", "visibility", "key_rate", "capacity_arm"}) {
    quantities.push_back(*model::find_quantity(name));
  }
  for (const fast::Value& value : fast::evaluate(point.chain, quantities, point.pattern)) {
    if (value.status != fast::Status::computed) {
      EXPECT_FALSE(value.reason.empty()) << model::name_of(value.quantity);
      continue;
    }
    const bool may_be_infinite = value.quantity.kind == model::QuantityKind::capacity_arm;
    EXPECT_TRUE(std::isfinite(value.value.significand) || may_be_infinite) << model::name_of(value.quantity);
    EXPECT_FALSE(std::isnan(value.value.significand)) << model::name_of(value.quantity);
  }
}

// Damage that always shows, or never does, would test one half only.
struct Tally {
  int read = 0, refused = 0;
  ~Tally() {
    EXPECT_GT(20 * read, refused);
    EXPECT_GT(20 * refused, read);
  }
};

TEST(MutatedScenario, IsReadOrRefused) {
  Tally tally;
  for_each_case(2000, 51, [&](Random& random) {
    const std::string text = mutated(random, scenario_text);
    SCOPED_TRACE(model::printable(text));
    expect_quick(text, [&] {
      const auto scenario = model::read_scenario(text, "link.toml");
      ++(scenario ? tally.read : tally.refused);
      if (!scenario) return expect_helpful(scenario.faults());
      const auto point = compare::case_at(*scenario, scenario->point_count() - 1);
      if (!point) return expect_helpful(point.faults());
      if (is_small(point->chain)) expect_numbers(*point);
    });
  });
}

TEST(MutatedBudget, IsReadOrRefused) {
  Tally tally;
  for_each_case(2000, 52, [&](Random& random) {
    const std::string text = mutated(random, budget_text);
    SCOPED_TRACE(model::printable(text));
    expect_quick(text, [&] {
      const auto budget = compare::read_budget(text, "budget.toml");
      ++(budget ? tally.read : tally.refused);
      if (!budget) expect_helpful(budget.faults());
    });
  });
}

void expect_judged(const reports::AuditPoint& point) {
  for (const reports::AuditResult& result : point.results) {
    EXPECT_FALSE(result.verdict.empty());
    for (const auto* number : {&result.relative_error, &result.lower, &result.upper}) {
      EXPECT_EQ(number->value_or("").find("nan"), std::string::npos) << number->value_or("");
    }
    EXPECT_TRUE(result.verdict != "unreadable" || !result.reason.empty()) << result.given;
  }
}

bool is_read_or_refused(const std::string& text) {
  const model::Scenario scenario =
      model::read_scenario(scenario_text.substr(0, scenario_text.find("[[sweep")), "link.toml").value();
  compare::AuditOptions options;
  options.threads = 1;
  compare::Auditor auditor(scenario, options, "table", expect_judged);
  const auto fault = compare::read_table(compare::bytes_of(text), "table", auditor);
  if (!fault) auditor.finish();
  if (fault) expect_helpful({*fault});
  if (!auditor.faults().empty()) expect_helpful(auditor.faults());
  return !fault && auditor.faults().empty();
}

TEST(MutatedTable, IsReadOrRefused) {
  Tally tally;
  for_each_case(1000, 53, [&](Random& random) {
    const std::string text = mutated(random, random() % 2 == 0 ? csv_text : json_text);
    SCOPED_TRACE(model::printable(text));
    expect_quick(text, [&] { ++(is_read_or_refused(text) ? tally.read : tally.refused); });
  });
}

}  // namespace
}  // namespace heraldgauge::test
