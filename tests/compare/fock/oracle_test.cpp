// The explicit Fock evaluator against the brute-force rows, which were made by other code at 60 digits: every row, the
// number-resolving ones included.

#include <gtest/gtest.h>

#include "compare/fock/chain.hpp"
#include "compare/fock/weights.hpp"
#include "tests/support/oracle.hpp"

namespace heraldgauge::compare::fock {
namespace {

TEST(FockChain, ReproducesTheBruteForceRows) {
  int checked = 0;
  for (const test::OracleRow& row : test::oracle_rows()) {
    if (row.kind == test::OracleRow::Kind::visibility) continue;
    SCOPED_TRACE(row.id);
    Description description;
    description.chain = row.chain;
    for (const model::Source& source : row.chain.sources)
      description.weights.push_back(model_weights(source, row.chain.station_count() == 0 ? 48 : 16));
    const Chain<double> chain(Arithmetic<double>{}, description);
    const auto sum = [&](const std::vector<model::Pattern>& patterns) {
      double total = 0;
      for (const model::Pattern& pattern : patterns) total += chain.pattern(pattern)[0];
      return total;
    };
    double value = sum(row.numerator);
    if (row.kind == test::OracleRow::Kind::ratio) value /= sum(row.denominator);
    const double expected = row.value.get_d();
    EXPECT_NEAR(value, expected, 1e-10 * std::abs(expected) + row.bound.get_d());
    ++checked;
  }
  EXPECT_GE(checked, 38);
}

}  // namespace
}  // namespace heraldgauge::compare::fock
