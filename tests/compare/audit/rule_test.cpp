// When a number counts as right.

#include <gtest/gtest.h>

#include "compare/audit/rule.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {
namespace {

using compare::Acceptance;
using compare::PrintedNumber;
using compare::Rule;
using model::Rational;

const model::Quantity gain{model::QuantityKind::gain};

// In lowest terms, as exact numbers always are.
Rational ratio(long numerator, long denominator) { return Rational(numerator) / denominator; }

PrintedNumber printed(const std::string& text) { return compare::read_printed(text).value(); }

TEST(PrintedNumber, KnowsHalfAUnitOfItsLastDigit) {
  EXPECT_EQ(printed("1.25e-3").half_unit, ratio(5, 1000000));
  EXPECT_EQ(printed("0.50").half_unit, ratio(5, 1000));
  EXPECT_EQ(printed("12").half_unit, ratio(1, 2));
  EXPECT_EQ(printed("1.2e+3").half_unit, Rational(50));
  EXPECT_EQ(printed("-7E2").half_unit, Rational(50));
  EXPECT_EQ(printed(".5").half_unit, ratio(5, 100));
  EXPECT_EQ(printed("3/7").half_unit, Rational(0));
  EXPECT_EQ(printed("1_0.2_5").half_unit, ratio(5, 1000));
  EXPECT_EQ(printed("0.0012300").significant_digits, 5);
  EXPECT_EQ(printed("0.00").significant_digits, 0);
  EXPECT_FALSE(compare::read_printed("abc"));
}

TEST(PrintedNumber, TellsNumbersFromOtherText) {
  for (const char* text : {"nan", "NaN", "-inf", "Infinity", "1.#QNAN"})
    EXPECT_TRUE(compare::is_not_a_number(text)) << text;
  EXPECT_FALSE(compare::is_not_a_number("nanometre"));
  EXPECT_TRUE(compare::has_decimal_comma("0,25"));
  EXPECT_TRUE(compare::has_decimal_comma("1,5e-3"));
  EXPECT_FALSE(compare::has_decimal_comma("a,b"));
}

TEST(Rule, AcceptsExactlyWhatItsFormulaSays) {
  for_each_case(2000, 12, [](Random& random) {
    const auto draw = [&](long limit) -> Rational {
      return Rational(static_cast<long>(random() % (2 * static_cast<unsigned long>(limit) + 1)) - limit) / 16;
    };
    const Rational value = draw(64), x = draw(64), absolute = abs(draw(8)), relative = abs(draw(15));
    const Acceptance acceptance = compare::within(value, absolute, relative);
    const Rational allowed = std::max(absolute, Rational(relative * abs(x)));
    const bool accepted = abs(value - x) <= allowed;
    EXPECT_EQ(acceptance.lower <= x && x <= acceptance.upper, accepted)
        << value << " " << x << " " << absolute << " " << relative;
  });
}

TEST(Rule, TakesTheLargerOfHalfAUnitAndItsFloor) {
  const Acceptance short_number = compare::accepted(printed("0.50"), std::nullopt, gain, Rule{});
  EXPECT_EQ(short_number.lower, ratio(495, 1000));
  const Acceptance long_number = compare::accepted(printed("0.50000000000000000000"), std::nullopt, gain, Rule{});
  EXPECT_EQ(long_number.lower, ratio(1, 2) / (1 + ratio(1, 1000000000000)));
  Rule as_printed;
  as_printed.as_printed = true;
  EXPECT_EQ(compare::accepted(printed("0.5000"), std::nullopt, gain, as_printed).upper, ratio(50005, 100000));
}

TEST(Rule, IsReplacedByTheColumnTheBudgetAndTheOptions) {
  Rule rule;
  rule.relative = ratio(1, 10);
  rule.absolute = ratio(1, 100);
  EXPECT_EQ(compare::accepted(printed("0.5"), std::nullopt, gain, rule).lower, ratio(1, 2) / ratio(11, 10));
  EXPECT_EQ(compare::accepted(printed("0.01"), std::nullopt, gain, rule).lower, Rational(0));
  rule.budget.all.named[gain] = {std::nullopt, ratio(1, 4)};
  EXPECT_EQ(compare::accepted(printed("0.5"), std::nullopt, gain, rule).upper, ratio(3, 4));
  EXPECT_EQ(compare::accepted(printed("0.5"), ratio(1, 8), gain, rule).upper, ratio(5, 8));
}

TEST(Rule, JudgesInThreeValues) {
  const Acceptance acceptance{1, 2};
  EXPECT_EQ(compare::judge(acceptance, {1, 2}), compare::Judgement::agrees);
  EXPECT_EQ(compare::judge(acceptance, {2, ratio(5, 2)}), compare::Judgement::undecided);
  EXPECT_EQ(compare::judge(acceptance, {ratio(21, 10), 3}), compare::Judgement::differs);
  EXPECT_EQ(compare::judge(acceptance, {0, 3}), compare::Judgement::undecided);
}

TEST(ReadingTolerance, ReadsUnitsPercentAndDecades) {
  EXPECT_EQ(compare::read_tolerance("0.5")->size, ratio(1, 2));
  EXPECT_EQ(compare::read_tolerance("2%")->size, ratio(1, 50));
  const compare::ReadingTolerance decades = *compare::read_tolerance("1dec");
  const Acceptance range = compare::read_within(5, decades);
  EXPECT_LE(range.lower, ratio(1, 2));
  EXPECT_GE(range.upper, Rational(50));
  EXPECT_LE(range.upper, ratio(50000001, 1000000));
  EXPECT_FALSE(compare::read_tolerance("100%"));
  EXPECT_FALSE(compare::read_tolerance("-1"));
  EXPECT_FALSE(compare::read_tolerance("x"));
}

TEST(Budget, ReadsLimitsByQuantityAndShortcut) {
  const auto budget = compare::read_budget(
      "gain = { relative = \"1/100\" }\nany = { absolute = 1e-3 }\n[shortcuts.pair-cutoff]\ngain = { relative = 0.5 "
      "}\n",
      "b");
  ASSERT_TRUE(budget);
  EXPECT_EQ(budget->limit(gain)->relative, ratio(1, 100));
  EXPECT_EQ(budget->limit(gain, "pair-cutoff")->relative, ratio(1, 2));
  EXPECT_EQ(budget->limit({model::QuantityKind::key_rate}, "pair-cutoff")->absolute, ratio(1, 1000));
  for (const char* bad : {"gains = { relative = 1 }", "gain = 3", "gain = {}", "gain = { relative = 1 }",
                          "gain = { absolute = -1 }", "gain = { often = 1 }", "shortcuts = 1", "gain ="}) {
    EXPECT_FALSE(compare::read_budget(bad, "b")) << bad;
  }
}

}  // namespace
}  // namespace heraldgauge::test
