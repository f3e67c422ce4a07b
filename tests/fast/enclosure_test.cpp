// The fast evaluator against certified enclosures: its own bound is never violated, and values are right to 1e-12.

#include <gtest/gtest.h>

#include <algorithm>

#include "fast/evaluate.hpp"
#include "reference/enclose.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::fast {
namespace {

using model::Quantity;
using model::QuantityKind;
using model::Rational;

Rational exact(const Scaled& x) {
  Rational value(x.significand);
  if (x.exponent >= 0) mpq_mul_2exp(value.get_mpq_t(), value.get_mpq_t(), static_cast<mp_bitcnt_t>(x.exponent));
  if (x.exponent < 0) mpq_div_2exp(value.get_mpq_t(), value.get_mpq_t(), static_cast<mp_bitcnt_t>(-x.exponent));
  return value;
}

class Judge {
 public:
  Judge(const model::Chain& chain, const std::vector<Quantity>& quantities) {
    reference::Request request;
    request.quantities = quantities;
    request.digits = 25;
    const auto enclosed = reference::enclose(chain, request);
    if (enclosed) results_ = *enclosed;
  }
  bool ready() const { return !results_.empty(); }

  // key_fraction and key_rate are judged relative to gain * sifting (times herald_probability) where that is larger.
  void check(const std::vector<Value>& values) const {
    for (std::size_t i = 0; i < values.size(); ++i) {
      SCOPED_TRACE(model::name_of(values[i].quantity));
      const bool undefined = results_[i].status == reference::Status::undefined;
      EXPECT_EQ(values[i].status == Status::undefined, undefined);
      if (undefined || !results_[i].enclosure) continue;
      ASSERT_EQ(values[i].status, Status::computed) << values[i].reason;
      check_value(values[i], *results_[i].enclosure);
    }
  }

 private:
  void check_value(const Value& value, const reference::Enclosure& enclosure) const {
    const Rational x = exact(value.value);
    if (enclosure.upper == 0) {
      EXPECT_EQ(x, 0);
    }
    const Rational scale = std::max(enclosure.upper, key_scale(value.quantity.kind));
    if (scale == 0) return;
    const Rational below = enclosure.lower - x;
    const Rational above = x - enclosure.upper;
    const double distance = Rational(std::max({below, above, Rational(0)}) / scale).get_d();
    EXPECT_LE(distance, value.relative_error_bound) << decimal(value.value);
    EXPECT_LE(distance, 1e-12);
    EXPECT_LE(value.relative_error_bound, 1e-12);
  }

  Rational upper_of(QuantityKind kind) const {
    for (const reference::Result& result : results_) {
      if (result.quantity.kind == kind && result.enclosure) return result.enclosure->upper;
    }
    return 0;
  }
  Rational key_scale(QuantityKind kind) const {
    if (kind == QuantityKind::key_fraction) return upper_of(QuantityKind::gain) / 2;
    if (kind != QuantityKind::key_rate) return 0;
    return upper_of(QuantityKind::gain) * upper_of(QuantityKind::herald_probability) / 2;
  }

  std::vector<reference::Result> results_;
};

void check_chains(int cases, std::uint64_t seed, const test::ChainRecipe& recipe) {
  test::for_each_case(cases, seed, [&](test::Random& random) {
    const model::Chain chain = test::random_chain(random, recipe);
    SCOPED_TRACE(test::describe_chain(chain));
    const std::vector<Quantity> quantities = model::all_quantities(false);
    const Judge judge(chain, quantities);
    ASSERT_TRUE(judge.ready());
    judge.check(evaluate(chain, quantities));
  });
}

TEST(FastAgainstEnclosures, RandomUnlikeChainsWithFreeAngles) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 1;
  recipe.smallest_lam = 1e-6;
  recipe.largest_lam = 0.1;
  recipe.smallest_transmission = 1e-4;
  check_chains(8, 20261201, recipe);
}

TEST(FastAgainstEnclosures, TwoStationsAligned) {
  test::ChainRecipe recipe;
  recipe.smallest_station_count = recipe.largest_station_count = 2;
  recipe.free_angles = false;
  recipe.largest_lam = 0.05;
  check_chains(2, 7, recipe);
}

TEST(FastAgainstEnclosures, AlikeTrunkOfThreeStations) {
  const model::Chain chain = test::alike_chain(3, "1/100", "1/10", "1/2", "1/1000000");
  const std::vector<Quantity> quantities = model::all_quantities(false);
  const Judge judge(chain, quantities);
  ASSERT_TRUE(judge.ready());
  judge.check(evaluate(chain, quantities));
}

}  // namespace
}  // namespace heraldgauge::fast
