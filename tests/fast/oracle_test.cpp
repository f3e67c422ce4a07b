// The fast evaluator against brute force: the rows of tests/published/oracle.json whose patterns are made of accepted
// heralds and of what the ends see. No other evaluator in between.

#include <gtest/gtest.h>

#include <algorithm>
#include <optional>

#include "fast/evaluate.hpp"
#include "tests/fast/judge.hpp"
#include "tests/support/oracle.hpp"

namespace heraldgauge::test {
namespace {

using fast::Status;
using model::Ask;
using model::Pattern;
using model::Quantity;
using model::QuantityKind;
using model::Rational;

Rational value_of(const model::Chain& chain, const Quantity& quantity) {
  const fast::Value value = fast::evaluate(chain, {quantity}).front();
  EXPECT_EQ(value.status, Status::computed) << model::name_of(quantity) << ": " << value.reason;
  return exact(value.value);
}

bool fits(const Ask& ask, bool clicks) {
  return ask.kind == Ask::Kind::not_looked_at || (ask.kind == Ask::Kind::clicks) == clicks;
}
bool fits(const Pattern& pattern, int outcome) {
  return fits(pattern.left[model::plus], (outcome & 8) != 0) && fits(pattern.left[model::cross], (outcome & 4) != 0) &&
         fits(pattern.right[model::plus], (outcome & 2) != 0) && fits(pattern.right[model::cross], (outcome & 1) != 0);
}

// The number of psi- outcomes, where every station shows one accepted outcome.
std::optional<int> minus_count(const Pattern& pattern) {
  int count = 0;
  for (const auto& detectors : pattern.stations) {
    const auto outcomes = model::accepted_outcomes(model::Herald::either);
    const auto found =
        std::find_if(outcomes.begin(), outcomes.end(), [&](const auto& one) { return one.detectors == detectors; });
    if (found == outcomes.end()) return std::nullopt;
    count += found->minus ? 1 : 0;
  }
  return count;
}

// Each row's detectors are alike within a station, so that its two accepted outcomes are equally likely, whatever the
// ends see. The rows are not corrected: the evaluator's correction (right angle reversed) is undone beforehand.
Rational probability(model::Chain chain, const Pattern& pattern) {
  if (*minus_count(pattern) % 2 == 1) chain.right_end.analyser_deg = -chain.right_end.analyser_deg;
  Rational given_herald = 0;
  for (int outcome = 0; outcome < 16; ++outcome) {
    if (fits(pattern, outcome)) given_herald += value_of(chain, {QuantityKind::end_pattern, outcome});
  }
  const Rational herald = value_of(chain, {QuantityKind::herald_probability});
  return herald * given_herald / Rational(1 << chain.station_count());
}

Rational total(const model::Chain& chain, const std::vector<Pattern>& patterns) {
  Rational sum = 0;
  for (const Pattern& one : patterns) sum += probability(chain, one);
  return sum;
}

Rational row_value(const OracleRow& row) {
  if (row.kind == OracleRow::Kind::visibility) return value_of(row.chain, {QuantityKind::visibility});
  const Rational numerator = total(row.chain, row.numerator);
  return row.denominator.empty() ? numerator : Rational(numerator / total(row.chain, row.denominator));
}

bool is_served(const OracleRow& row) {
  const auto heralded = [](const Pattern& pattern) { return minus_count(pattern).has_value(); };
  return !row.resolving && std::all_of(row.numerator.begin(), row.numerator.end(), heralded) &&
         std::all_of(row.denominator.begin(), row.denominator.end(), heralded);
}

TEST(FastOracle, EveryHeraldedThresholdRowToTwelveDigits) {
  int rows = 0;
  for (const OracleRow& row : oracle_rows()) {
    if (!is_served(row)) continue;
    SCOPED_TRACE(row.id + " " + row.note);
    const Rational value = row_value(row);
    const Rational distance = std::max<Rational>({row.lower() - value, value - row.upper(), 0});
    EXPECT_LE(Rational(distance / row.upper()).get_d(), 1e-12) << value.get_d() << " against " << row.value.get_d();
    ++rows;
  }
  EXPECT_EQ(rows, 36);  // all 38 but "everything clicks" and the partly specified station
}

}  // namespace
}  // namespace heraldgauge::test
