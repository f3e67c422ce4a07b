// The brute-force rows: explicit truncated Fock matrices at 60 digits, summed over pair numbers.
#include <gtest/gtest.h>

#include "reference/pair_number/route.hpp"
#include "tests/support/oracle.hpp"

namespace heraldgauge::reference {
namespace {

using test::OracleRow;

constexpr Accuracy accuracy{256, -140};

Interval sum_of(const Route& route, const std::vector<model::Pattern>& patterns) {
  Interval sum(accuracy.bits);
  for (const model::Pattern& pattern : patterns) sum += route.pattern(pattern, accuracy).value;
  return sum;
}

Interval value_of(const OracleRow& row) {
  const auto route = make_pair_number_route(row.chain);
  const Interval numerator = sum_of(*route, row.numerator);
  return row.denominator.empty() ? numerator : numerator / sum_of(*route, row.denominator);
}

TEST(PairNumberRoute, AgreesWithBruteForceRows) {
  int judged = 0;
  for (const OracleRow& row : test::oracle_rows()) {
    if (row.kind == OracleRow::Kind::visibility) continue;
    SCOPED_TRACE(row.id + " " + row.note);
    ASSERT_EQ(pair_number_refusal(row.chain), std::nullopt);
    const Interval value = value_of(row);
    EXPECT_TRUE(overlap(value, Interval(row.lower(), row.upper(), 512)));
    EXPECT_LT(value.log2_width(), value.log2_mignitude() - 80) << "not tight";
    ++judged;
  }
  EXPECT_GE(judged, 35);
}

}  // namespace
}  // namespace heraldgauge::reference
