// The two certified routes share no formula; on every chain that both serve their enclosures must meet.
#include <gtest/gtest.h>

#include <cmath>

#include "reference/determinant/route.hpp"
#include "reference/pair_number/route.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using test::Random;

// Bits and tail for about this many digits of the herald probability.
Accuracy accuracy_for(const model::Chain& chain, int digits) {
  const double asked = std::log2(10.0) * digits;
  return {static_cast<Precision>(asked) + 64, pair_number_log2_herald(chain) - asked - 4};
}

// Weaker sources for more digits: the pairs to be kept, and with them the cost of all sectors, stay the same.
model::Chain chain_for(Random& random, int digits) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 4;
  recipe.largest_lam = digits <= 20 ? 0.1 : digits <= 50 ? 1e-2 : 1e-6;
  recipe.smallest_lam = recipe.largest_lam * 1e-3;
  return test::random_chain(random, recipe);
}

void expect_meeting_tables(const Route& first, const Route& second, Basis basis, const Accuracy& accuracy) {
  const auto a = first.ends(basis, accuracy);
  const auto b = second.ends(basis, accuracy);
  for (std::size_t left = 0; left < 4; ++left) {
    for (std::size_t right = 0; right < 4; ++right) {
      EXPECT_TRUE(overlap(a.value.joint[left][right], b.value.joint[left][right])) << left << " " << right;
    }
  }
}

void expect_meeting_profiles(const AngularProfile& kept, const AngularProfile& other) {
  const auto coefficient = [](const std::vector<Interval>& series, std::size_t q) {
    return q < series.size() ? series[q] : Interval(64);
  };
  // What the tail adds to any Fourier coefficient is at most twice the tail.
  const Interval slack = hull(-kept.tail, kept.tail) * 2 + hull(-other.remainder[0], other.remainder[0]) * 2;
  for (std::size_t q = 0; q < kept.cosine.size(); ++q) {
    EXPECT_TRUE(overlap(coefficient(kept.cosine, q) + slack, coefficient(other.cosine, q))) << "cosine " << q;
    EXPECT_TRUE(overlap(coefficient(kept.sine, q) + slack, coefficient(other.sine, q))) << "sine " << q;
  }
}

void expect_meeting_routes(Random& random, int digits) {
  const model::Chain chain = chain_for(random, digits);
  SCOPED_TRACE(test::describe_chain(chain));
  const Accuracy accuracy = accuracy_for(chain, digits);
  const auto pair_number = make_pair_number_route(chain);
  const auto determinant = make_determinant_route(chain);
  const auto herald = pair_number->herald(accuracy);
  EXPECT_TRUE(overlap(herald.value, determinant->herald(accuracy).value));
  EXPECT_LT(herald.value.log2_width(), herald.value.log2_mignitude() - std::log2(10.0) * digits);
  for (const Basis basis : {Basis::analyser, Basis::rectilinear, Basis::diagonal}) {
    expect_meeting_tables(*pair_number, *determinant, basis, accuracy);
  }
  expect_meeting_profiles(pair_number->profile(accuracy), determinant->profile(accuracy));
}

class RoutesOverlap : public testing::TestWithParam<int> {};

TEST_P(RoutesOverlap, OnRandomChains) {
  const int digits = GetParam();
  test::for_each_case(digits <= 20   ? 8
                      : digits <= 50 ? 3
                                     : 1,
                      700 + static_cast<std::uint64_t>(digits),
                      [digits](Random& random) { expect_meeting_routes(random, digits); });
}

INSTANTIATE_TEST_SUITE_P(Digits, RoutesOverlap, testing::Values(20, 50, 200));

}  // namespace
}  // namespace heraldgauge::reference
