// The evaluator against brute force: 38 rows with threshold detectors, summed at 60 digits over explicit Fock matrices
// (tests/published/oracle.json). A row's interval is its printed value with its certified truncation bound.
#include <gtest/gtest.h>

#include "tests/support/certified.hpp"
#include "tests/support/oracle.hpp"

namespace heraldgauge::test {
namespace {

using reference::Enclosure;

constexpr int digits = 30;

Enclosure total(const model::Chain& chain, const std::vector<model::Pattern>& patterns) {
  Enclosure all{0, 0};
  for (const model::Pattern& one : patterns) {
    const Enclosure value = enclosure(chain, one, digits);
    EXPECT_TRUE(has_width(value, digits)) << shown(value);
    all = sum(all, value);
  }
  return all;
}

Enclosure row_value(const OracleRow& row) {
  if (row.kind == OracleRow::Kind::visibility) return enclosure(row.chain, "visibility", digits);
  const Enclosure numerator = total(row.chain, row.numerator);
  return row.denominator.empty() ? numerator : quotient(numerator, total(row.chain, row.denominator));
}

std::vector<OracleRow> threshold_rows() {
  std::vector<OracleRow> rows;
  for (OracleRow& row : oracle_rows()) {
    if (!row.resolving) rows.push_back(std::move(row));
  }
  return rows;
}

TEST(Oracle, HasThirtyEightThresholdRowsAndFourResolvingOnes) {
  EXPECT_EQ(oracle_rows().size(), 42U);
  EXPECT_EQ(threshold_rows().size(), 38U);
}

TEST(Oracle, EveryThresholdRowContainsTheEnclosure) {
  for (const OracleRow& row : threshold_rows()) {
    SCOPED_TRACE(row.id + " " + row.note);
    const Enclosure value = row_value(row);
    EXPECT_GE(value.lower, row.lower()) << shown(value);
    EXPECT_LE(value.upper, row.upper()) << shown(value);
    EXPECT_TRUE(has_width(value, digits - 1)) << shown(value);
  }
}

// The comparison would notice a wrong formula: a row's interval is narrow to its trusted digits.
TEST(Oracle, RowsAreAsNarrowAsTheirTrustedDigits) {
  for (const OracleRow& row : threshold_rows()) {
    EXPECT_TRUE(has_width({row.lower(), row.upper()}, row.trusted_digits - 1)) << row.id;
    EXPECT_GE(row.trusted_digits, 14) << row.id;
  }
}

// The right angle of a visibility row is without meaning, and the left one is not.
TEST(Oracle, VisibilityDoesNotDependOnTheRightAngleThatIsSet) {
  for (OracleRow& row : threshold_rows()) {
    if (row.kind != OracleRow::Kind::visibility) continue;
    row.chain.right_end.analyser_deg = model::Rational(77, 3);
    const Enclosure value = row_value(row);
    EXPECT_TRUE(row.lower() <= value.lower && value.upper <= row.upper()) << row.id << " " << shown(value);
  }
}

// Moving any one parameter of the one-station row with unequal arms by a tenth leaves the row's interval.
TEST(Oracle, EveryParameterOfTheUnequalRowMatters) {
  const auto rows = oracle_rows();
  const auto row = std::find_if(rows.begin(), rows.end(), [](const OracleRow& one) { return one.id == "N1-04"; });
  ASSERT_NE(row, rows.end());
  const model::Real smaller(model::Rational(9, 10));
  const auto leaves = [&](auto change) {
    OracleRow changed = *row;
    change(changed.chain);
    const Enclosure value = row_value(changed);
    return value.upper < row->lower() || value.lower > row->upper();
  };
  const auto scaled_down = [&](model::Real& x) { x = x * smaller; };
  EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.sources[0].pair_parameter); }));
  EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.sources[1].pair_parameter); }));
  EXPECT_TRUE(leaves([&](model::Chain& c) { std::swap(c.right_arms[0], c.left_arms[1]); }));
  EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.left_arms[0].transmittance); }));
  EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.right_arms[1].transmittance); }));
  EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.stations[0].indistinguishability); }));
  EXPECT_TRUE(leaves([&](model::Chain& c) { c.left_end.analyser_deg = -c.left_end.analyser_deg; }));
  for (std::size_t j = 0; j < 4; ++j) {
    EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.stations[0].detectors[j].efficiency); })) << j;
    EXPECT_TRUE(leaves([&](model::Chain& c) { scaled_down(c.stations[0].detectors[j].dark_probability); })) << j;
  }
}

}  // namespace
}  // namespace heraldgauge::test
