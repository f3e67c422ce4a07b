// Limits, symmetries and closed forms that the fast evaluator must meet by itself.

#include "fast/evaluate.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <cstring>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::fast {
namespace {

using model::Quantity;
using model::QuantityKind;
using model::Rational;
using model::Real;

double value_of(const model::Chain& chain, const Quantity& quantity) {
  const Value value = evaluate(chain, {quantity}).front();
  EXPECT_EQ(value.status, Status::computed) << value.reason;
  return to_binary64(value.value);
}

bool same_bytes(const std::vector<Value>& a, const std::vector<Value>& b) {
  bool same = a.size() == b.size();
  for (std::size_t i = 0; same && i < a.size(); ++i) {
    same = a[i].status == b[i].status && a[i].value.exponent == b[i].value.exponent &&
           std::memcmp(&a[i].value.significand, &b[i].value.significand, sizeof(double)) == 0 &&
           std::memcmp(&a[i].relative_error_bound, &b[i].relative_error_bound, sizeof(double)) == 0;
  }
  return same;
}

TEST(FastEvaluate, SixteenEndPatternsSumToOne) {
  test::ChainRecipe recipe;
  recipe.largest_lam = 0.05;
  recipe.largest_station_count = 2;
  test::for_each_case(3, 11, [&](test::Random& random) {
    const model::Chain chain = test::random_chain(random, recipe);
    double sum = 0;
    for (int outcome = 0; outcome < 16; ++outcome) sum += value_of(chain, {QuantityKind::end_pattern, outcome});
    EXPECT_NEAR(sum, 1, 1e-14);
  });
}

TEST(FastEvaluate, MirroredChainHasTheSameHeraldAndGain) {
  test::ChainRecipe recipe;
  recipe.largest_lam = 0.05;
  recipe.smallest_station_count = 1;
  test::for_each_case(3, 12, [&](test::Random& random) {
    const model::Chain chain = test::random_chain(random, recipe);
    for (const QuantityKind kind :
         {QuantityKind::herald_probability, QuantityKind::gain, QuantityKind::qber_rectilinear}) {
      const double one = value_of(chain, {kind});
      EXPECT_NEAR(value_of(model::mirrored(chain), {kind}) / one, 1, 1e-13);
    }
  });
}

// Ma, Fung and Lo (2007): the gain of one source, alike detectors within each end.
TEST(FastEvaluate, GainOfOneSourceInClosedForm) {
  const model::Chain chain = test::alike_chain(0, "1/20", "1/4", "1/2", "1/1000");
  const double mu = 0.05 / 0.95;
  const double eta = 0.125;
  const double quiet = 0.999 * 0.999;
  const double gain =
      1 - 2 * quiet / std::pow(1 + eta * mu, 2) + quiet * quiet / std::pow(1 + (2 * eta - eta * eta) * mu, 2);
  EXPECT_NEAR(value_of(chain, {QuantityKind::gain}) / gain, 1, 1e-10);  // the right side cancels to 1e-12 itself
}

TEST(FastEvaluate, WithoutPairsOnlyDarkEventsHerald) {
  const model::Chain chain = test::alike_chain(2, "0", "1/4", "1/2", "1/1024");
  const double d = 1.0 / 1024;
  const double station = 2 * d * d * (1 - d) * (1 - d);
  EXPECT_NEAR(value_of(chain, {QuantityKind::herald_probability}) / (station * station), 1, 1e-14);
}

TEST(FastEvaluate, ImpossibleHeraldIsUndefinedByName) {
  const model::Chain chain = test::alike_chain(1, "0", "1/4", "1/2", "0");
  EXPECT_EQ(value_of(chain, {QuantityKind::herald_probability}), 0);
  const Value gain = evaluate(chain, {{QuantityKind::gain}}).front();
  EXPECT_EQ(gain.status, Status::undefined);
  EXPECT_NE(gain.reason.find("herald_probability"), std::string::npos);
}

TEST(FastEvaluate, OrthogonalLosslessAnalysersNeverAgree) {
  model::Chain chain = test::alike_chain(0, "1/10", "1", "1", "0");
  chain.left_end.analyser_deg = Rational(45);
  chain.right_end.analyser_deg = Rational(135);
  EXPECT_EQ(value_of(chain, {QuantityKind::end_pattern, 0b1010}), 0);
  EXPECT_GT(value_of(chain, {QuantityKind::end_pattern, 0b1001}), 0);
  EXPECT_EQ(value_of(chain, {QuantityKind::visibility_deficit}), 0);
}

TEST(FastEvaluate, AngleOfADirectLinkCountsByDifferenceOnly) {
  model::Chain chain = test::alike_chain(0, "1/10", "1/2", "1/2", "1/100");
  chain.left_end.analyser_deg = Rational(1, 10);
  chain.right_end.analyser_deg = Rational(902, 10);
  model::Chain turned = chain;
  turned.left_end.analyser_deg = Rational(1, 3);
  turned.right_end.analyser_deg = Rational(1, 3) + Rational(901, 10) - 180;
  const Quantity both_plus{QuantityKind::end_pattern, 0b1010};
  EXPECT_EQ(value_of(chain, both_plus), value_of(turned, both_plus));
}

TEST(FastEvaluate, ThousandStationsStayScaled) {
  const model::Chain chain = test::alike_chain(1000, "1/100", "1/10", "1/2", "1/1000000");
  const Value value = evaluate(chain, {{QuantityKind::herald_probability}}).front();
  ASSERT_EQ(value.status, Status::computed);
  EXPECT_LT(value.value.exponent, -10000);
  EXPECT_LT(value.relative_error_bound, 1e-10);
}

TEST(FastEvaluate, BytesDoNotDependOnCompanyOrThreads) {
  std::vector<model::Chain> chains(10, test::alike_chain(1, "1/100", "1/10", "1/2", "1/1000000"));
  for (std::size_t i = 0; i < chains.size(); ++i) {
    chains[i].left_arms[0].transmittance = Rational(static_cast<long>(100 + i), 1000);
  }
  const std::vector<Quantity> quantities = model::all_quantities(false);
  std::vector<Value> together, threaded, one_by_one;
  evaluate_all(chains, quantities, std::nullopt, 1, together);
  evaluate_all(chains, quantities, std::nullopt, 2, threaded);
  for (const model::Chain& chain : chains) {
    for (const Value& value : evaluate(chain, quantities)) one_by_one.push_back(value);
  }
  EXPECT_TRUE(same_bytes(together, threaded));
  EXPECT_TRUE(same_bytes(together, one_by_one));
}

// Points of one structure go through the kernel together, however many; unlike ones go by themselves.
TEST(FastEvaluate, BytesOfRandomChainsDoNotDependOnCompanyOrThreads) {
  const std::vector<Quantity> quantities = model::all_quantities(false);
  test::for_each_case(3, 13, [&](test::Random& random) {
    test::ChainRecipe recipe;
    recipe.smallest_lam = 1e-4;
    recipe.largest_lam = 0.02;
    recipe.largest_station_count = 2;
    std::vector<model::Chain> chains;
    for (int structure = 0; structure < 3; ++structure) {
      model::Chain chain = test::random_chain(random, recipe);
      const auto points = 1 + random() % 20;
      for (std::uint64_t i = 0; i < points; ++i) {
        chain.right_arms.back().transmittance = Rational(test::log_uniform(random, 0.1, 0.2));
        chains.insert(chains.begin() + static_cast<std::ptrdiff_t>(random() % (chains.size() + 1)), chain);
      }
    }
    std::vector<Value> together;
    evaluate_all(chains, quantities, std::nullopt, 2, together);
    for (std::size_t i = 0; i < chains.size(); ++i) {
      const auto first = together.begin() + static_cast<std::ptrdiff_t>(i * quantities.size());
      const std::vector<Value> in_company(first, first + static_cast<std::ptrdiff_t>(quantities.size()));
      EXPECT_TRUE(same_bytes(in_company, evaluate(chains[i], quantities))) << test::describe_chain(chains[i]);
    }
  });
}

TEST(FastEvaluate, DeclinesByName) {
  model::Chain chain = test::alike_chain(1, "1/100", "1/10", "1/2", "0");
  chain.stations[0].background.photons = Real(Rational(1, 10));
  const Value value = evaluate(chain, {{QuantityKind::gain}}).front();
  EXPECT_EQ(value.status, Status::declined);
  EXPECT_NE(value.reason.find("background_photons"), std::string::npos);
}

TEST(FastDecimal, SeventeenDigitsCorrectlyRounded) {
  EXPECT_EQ(decimal({0.5, 1}), "1.0000000000000000e0");
  EXPECT_EQ(decimal({0.5, 0}), "5.0000000000000000e-1");
  EXPECT_EQ(decimal({-0.75, 2}), "-3.0000000000000000e0");
  EXPECT_EQ(decimal({0.1 * 8, -3}), "1.0000000000000001e-1");
  EXPECT_EQ(decimal({0, 0}), "0");
  // 2^-10000 = 5.0123727492064520093...e-3011, computed with integers.
  EXPECT_EQ(decimal({0.5, -9999}), "5.0123727492064520e-3011");
}

}  // namespace
}  // namespace heraldgauge::fast
