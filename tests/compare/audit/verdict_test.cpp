// Verdicts of an audit against certified values.

#include <gtest/gtest.h>

#include <algorithm>

#include "reference/arithmetic/decimal.hpp"
#include "tests/compare/audit/audited.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {
namespace {

using compare::AuditOptions;
using model::Rational;
using Words = std::vector<std::string>;

const std::string direct_link =
    "chain.stations = 0\nsource.pair_parameter = 0.1\nchannel.transmittance = 0.5\nend.detector.efficiency = 0.5\n"
    "end.detector.dark_probability = 0.0009765625\n";

// The gain of that link, certified far beyond what a table prints, from its closed form (Ma, Fung, Lo 2007): mu =
// lam/(1-lam), eta the end's efficiency times its transmittance, Y = 1-(1-d)^2.
Rational exact_gain(const Rational& lam, const Rational& transmittance) {
  const Rational mu = lam / (1 - lam), eta = transmittance / 2;
  const Rational silent = Rational(1023, 1024) * Rational(1023, 1024);
  const Rational one = 1 + eta * mu, both = 1 + (2 * eta - eta * eta) * mu;
  return 1 - 2 * silent / (one * one) + silent * silent / (both * both);
}

std::string decimal(const Rational& x, int digits) {
  return reference::decimal(x, digits, reference::Direction::nearest);
}

TEST(Verdict, FollowsHalfAUnitOfTheLastDigit) {
  const Rational gain = exact_gain(Rational(1, 10), Rational(1, 2));
  const std::string right = decimal(gain, 8);
  const Rational unit = 2 * compare::read_printed(right)->half_unit;
  const std::string off = decimal(*model::parse_exact(right) + unit, 8);
  EXPECT_EQ(
      audited(direct_link, "gain\n" + right + "\n" + off + "\n" + decimal(gain, 40) + "\nnan\nabout 1\n").verdicts(),
      (Words{"agrees", "differs", "agrees", "unreadable", "unreadable"}));
}

TEST(Verdict, KnowsHowManyDigitsAgree) {
  const Rational gain = exact_gain(Rational(1, 10), Rational(1, 2));
  for (const int digits : {3, 7, 12, 18, 25, 50, 90}) {
    const Audited result = audited(direct_link, "gain\n" + decimal(gain, digits) + "\n");
    const Rational printed = *model::parse_exact(decimal(gain, digits));
    const Rational error = abs(printed - gain) / gain;
    long expected = 0;
    for (Rational power = Rational(1, 10); error <= power && expected < 99; power /= 10) ++expected;
    EXPECT_EQ(result.points[0].results[0].agreeing_digits, expected) << digits;
    EXPECT_EQ(result.points[0].results[0].verdict, "agrees");
  }
}

TEST(Verdict, SetsThePointFromKeysAndAddresses) {
  const Rational gain = exact_gain(Rational(1, 5), Rational(1, 4));
  const std::string table = "source.pair_parameter,channel.transmittance,gain\n0.2,1/4," + decimal(gain, 9) +
                            "\n0.1,0.5," + decimal(gain, 9) + "\n";
  EXPECT_EQ(audited(direct_link, table).verdicts(), (Words{"agrees", "differs"}));
  const std::string by_address =
      "source.0.pair_parameter,arm.0.left.transmittance,arm.0.right.transmittance,gain\n0.2,0.25,0.25," +
      decimal(gain, 9) + "\n";
  EXPECT_EQ(audited(direct_link, by_address).verdicts(), Words{"agrees"});
}

TEST(Verdict, ReadsJsonAndCsvAlike) {
  const std::string gain = decimal(exact_gain(Rational(1, 5), Rational(1, 2)), 9);
  const Audited csv = audited(direct_link, "source.pair_parameter,gain,gain.tolerance\n0.2," + gain + ",\n0.2,0.5,1\n");
  const Audited json =
      audited(direct_link, "[{\"source.pair_parameter\": 0.2, \"gain\": " + gain +
                               ", \"gain.tolerance\": null},\n{\"source.pair_parameter\": \"1/5\", \"gain\": 0.5, "
                               "\"gain.tolerance\": 1}]");
  EXPECT_EQ(csv.verdicts(), (Words{"agrees", "agrees"}));
  EXPECT_EQ(json.verdicts(), csv.verdicts());
  EXPECT_EQ(json.points[0].results[0].lower, csv.points[0].results[0].lower);
}

TEST(Verdict, TakesInputsAsTypedOrAsBinary64) {
  // 0.1 in binary64 is 0.1 (1 + 5.6e-17): the 30th digit of the gain tells the two apart.
  const Rational typed(1, 10), stored(0.1);
  const std::string table = "source.pair_parameter,gain\n0.1," + decimal(exact_gain(typed, Rational(1, 2)), 30) +
                            "\n0.1," + decimal(exact_gain(stored, Rational(1, 2)), 30) + "\n";
  AuditOptions as_printed;
  as_printed.rule.as_printed = true;
  EXPECT_EQ(audited(direct_link, table, as_printed).verdicts(), (Words{"agrees", "differs"}));
  EXPECT_EQ(audited("inputs = \"binary64\"\n" + direct_link, table, as_printed).verdicts(),
            (Words{"differs", "agrees"}));
  EXPECT_EQ(audited(direct_link, table).verdicts(), (Words{"agrees", "agrees"}));
}

TEST(Verdict, RaisesDigitsUntilDecided) {
  // One station, angles without rational cosines: no exact rational, so a number next to the exact one needs many
  // digits.
  const std::string link =
      "chain.stations = 1\nsource.pair_parameter = 0.1\nchannel.transmittance = 0.5\nstation.detector.efficiency = "
      "0.5\n"
      "end.detector.efficiency = 0.5\nanalyser.left_deg = 17\nanalyser.right_deg = 73\n";
  const Audited first = audited(link, "end_pattern_1010\n0.5\n");
  reference::Request request;
  request.quantities = {*model::find_quantity("end_pattern_1010")};
  request.digits = 80;
  const auto scenario = model::read_scenario(link, "link");
  const auto exact = reference::enclose(*model::chain_at(*scenario, 0), request);
  const Rational middle = (exact->front().enclosure->lower + exact->front().enclosure->upper) / 2;
  const Rational step = Rational(1) / *model::parse_exact("1e60");
  AuditOptions tight;
  tight.rule.absolute = step;
  const std::string table =
      "end_pattern_1010\n" + decimal(middle + step / 2, 75) + "\n" + decimal(middle + 2 * step, 75) + "\n";
  EXPECT_EQ(audited(link, table, tight).verdicts(), (Words{"agrees", "differs"}));
  EXPECT_EQ(first.verdicts(), Words{"differs"});
}

TEST(Verdict, DecidesAgainstIrrationalNumbers) {
  // -log2(1 - 1/4) is no decimal, so without any tolerance none is right.
  AuditOptions none;
  none.rule.absolute = Rational(0);
  EXPECT_EQ(audited(direct_link, "capacity_point\n0.415037499278843818546261056052183491\n", none).verdicts(),
            Words{"differs"});
  EXPECT_EQ(audited(direct_link, "capacity_point\n0.415037499278843818546261056052183491\n").verdicts(),
            Words{"agrees"});
}

TEST(Verdict, CallsAKeyRateBeyondAnArmImpossible) {
  // One arm of transmittance 0.5 carries at most 1 bit a mode, 2 a trial; the two arms of the source in a row 0.83.
  const Audited result = audited(direct_link, "key_rate,key_rate.tolerance\n2.01,9\n1.99,\n0.9,\n0.8,\n2.4,9\n");
  EXPECT_EQ(result.verdicts(), (Words{"impossible", "differs", "differs", "differs", "impossible"}));
  ASSERT_FALSE(result.answer.conclusion.summary.remarks.empty());
  EXPECT_NE(result.answer.conclusion.summary.remarks[0].find("4 numbers above 2 capacity_chain"), std::string::npos)
      << result.answer.conclusion.summary.remarks[0];
  const std::string lossless =
      "chain.stations = 0\nsource.pair_parameter = 0.1\nchannel.transmittance = 1\nend.detector.efficiency = 0.5\n";
  EXPECT_EQ(audited(lossless, "key_rate\n99\n").verdicts(), Words{"differs"});
}

TEST(Verdict, SaysUndecidedWhereTheQuantityIsUndefined) {
  const Audited result =
      audited(direct_link, "source.pair_parameter,end.detector.dark_probability,qber_diagonal\n0,0,0.5\n");
  EXPECT_EQ(result.verdicts(), Words{"undecided"});
  EXPECT_FALSE(result.points[0].results[0].lower);
  EXPECT_FALSE(result.points[0].results[0].reason.empty());
}

TEST(Verdict, IsTheSameForAnyNumberOfThreads) {
  std::string table = "source.pair_parameter,gain,qber_diagonal\n";
  for (int i = 1; i < 60; ++i) table += "0.0" + std::to_string(i) + ",0.01,0.02\n";
  AuditOptions one, three;
  one.threads = 1;
  three.threads = 3;
  const Audited a = audited(direct_link, table, one), b = audited(direct_link, table, three);
  EXPECT_EQ(a.verdicts(), b.verdicts());
  for (std::size_t i = 0; i < a.points.size(); ++i)
    EXPECT_EQ(a.points[i].results[0].lower, b.points[i].results[0].lower);
}

TEST(Audit, SummarisesWhereNumbersDisagree) {
  std::string table = "source.pair_parameter,gain\n";
  for (int i = 1; i <= 9; ++i) {
    const Rational lam = Rational(i) / 10;
    table += "0." + std::to_string(i) + "," +
             decimal(exact_gain(lam, Rational(1, 2)) + (i > 6 ? Rational(1, 100) : Rational(0)), 12) + "\n";
  }
  const reports::AuditSummary summary = audited(direct_link, table).answer.conclusion.summary;
  EXPECT_EQ(summary.rows, 9u);
  EXPECT_EQ(summary.counts.differs, 3u);
  ASSERT_EQ(summary.quantities[0].where.size(), 1u);
  const reports::DisagreementRange& range = summary.quantities[0].where[0];
  EXPECT_EQ(range.from + " " + range.to + " " + range.table_from + " " + range.table_to, "0.7 0.9 0.1 0.9");
  EXPECT_TRUE(range.apart);
  EXPECT_EQ(summary.quantities[0].digits_worst, 1);
  EXPECT_GE(*summary.quantities[0].digits_median, 11);
}

TEST(Audit, RefusesWhatItCannotUse) {
  const auto expect_fault = [](const std::string& table, const std::string& part) {
    const std::string lines = audit_faults(direct_link, table);
    EXPECT_NE(lines.find(part), std::string::npos) << lines << table;
  };
  expect_fault("source.pair_parameter\n0.1\n", "no column holds numbers to judge");
  expect_fault("gain\n", "the table has no rows");
  expect_fault("gain\n\"0,5\"\n", "table:2: gain: '0,5' has a comma");
  expect_fault("source.pair_parameter,gain\n0.1,1\n1.5,1\nx,1\n", "table:3: source.pair_parameter");
  expect_fault("source.pair_parameter,gain\n0.1,1\n1.5,1\nx,1\n", "table:4: source.pair_parameter");
  expect_fault("gain,gain.tolerance\n1,-1\n", "table:2: gain.tolerance");
  EXPECT_NE(audit_faults(direct_link + "[[sweep]]\nkey = \"source.pair_parameter\"\nvalues = [0.1, 0.2]\n", "gain\n1\n")
                .find("the scenario sweeps it"),
            std::string::npos);
  const Audited unknown = audited(direct_link, "gains,gain,colour\n1,0.1,red\n");
  ASSERT_EQ(unknown.answer.warnings.size(), 2u);
  EXPECT_NE(unknown.answer.warnings[0].find("did you mean gain?"), std::string::npos) << unknown.answer.warnings[0];
}

TEST(Audit, JudgesReadingsAgainstTheBandOfTheAxis) {
  // Read at lam = 0.2 +- 0.01 with 1 % on the height: anything between the gains at 0.19 and 0.21, one per cent more.
  AuditOptions options;
  options.rule.digitised = compare::Digitised{*compare::read_tolerance("0.01"), *compare::read_tolerance("1%")};
  const Rational low = exact_gain(Rational(19, 100), Rational(1, 2)),
                 high = exact_gain(Rational(21, 100), Rational(1, 2));
  const auto row = [](const Rational& gain) { return "0.2," + decimal(gain, 12) + "\n"; };
  const std::string table = "source.pair_parameter,gain\n" + row(low) + row(high) + row(low * Rational(124, 125)) +
                            row(high * Rational(126, 125)) + row(low * Rational(19, 20)) + row(high * Rational(21, 20));
  EXPECT_EQ(audited(direct_link, table, options).verdicts(),
            (Words{"agrees", "agrees", "agrees", "agrees", "differs", "differs"}));
}

}  // namespace
}  // namespace heraldgauge::test
