#include "reference/determinant/exact_zero.hpp"

#include <gtest/gtest.h>

#include "reference/determinant/joint.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Rational;
using model::Real;
using test::Random;

// Sets parameters to the ends of their ranges here and there, where zeros live.
void push_to_the_ends(Random& random, Chain& chain) {
  const auto push = [&random](Real& x) {
    if (random() % 2 == 0) x = Real(static_cast<int>(random() % 2));
  };
  for (auto* arms : {&chain.left_arms, &chain.right_arms}) {
    for (model::Arm& arm : *arms) push(arm.transmittance);
  }
  for (model::Station& station : chain.stations) {
    for (model::Detector& detector : station.detectors) {
      push(detector.efficiency);
      detector.dark_probability = Real(0);
    }
  }
  for (model::End* end : {&chain.left_end, &chain.right_end}) {
    end->analyser_deg = Rational(45) * static_cast<long>(random() % 4);
    for (model::Detector& detector : end->detectors) {
      push(detector.efficiency);
      detector.dark_probability = Real(0);
    }
  }
}

TEST(ExactZero, HasTheZerosOfTheChainItself) {
  int zeros_met = 0;
  test::for_each_case(60, 60261, [&zeros_met](Random& random) {
    Chain chain = test::random_chain(random, {.largest_station_count = 1});
    push_to_the_ends(random, chain);
    const auto zeros = exact_zeros(chain, Basis::analyser);
    ASSERT_TRUE(zeros);
    const EndTable<Rational> table = joint_table(Field<Rational>{}, chain, Basis::analyser);
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) {
        EXPECT_EQ(zeros->joint[l][r], table.joint[l][r] == 0) << l << r << test::describe_chain(chain);
        zeros_met += zeros->joint[l][r] ? 1 : 0;
      }
    }
    EXPECT_EQ(is_exactly_zero_herald(chain), herald_probability(Field<Rational>{}, chain) == 0);
  });
  EXPECT_GT(zeros_met, 20) << "the cases must hold zeros, or they prove nothing";
}

TEST(ExactZero, IsNotClaimedAtIrrationalAngles) {
  Chain chain = test::alike_chain(1, "1/10", "1", "1", "0");
  chain.right_end.analyser_deg = 17;
  EXPECT_EQ(exact_zeros(chain, Basis::analyser), std::nullopt);
}

TEST(ExactZero, AtEveryAngleOnlyWhereNoPhotonReachesTheRightPlusDetector) {
  Chain chain = test::alike_chain(1, "1/10", "1/2", "1/2", "0");
  EXPECT_FALSE(is_zero_at_every_angle(chain));
  chain.right_arms.back().transmittance = Real(0);
  EXPECT_TRUE(is_zero_at_every_angle(chain));
  chain.right_end.detectors[model::plus].dark_probability = Rational(1, 1000);
  EXPECT_FALSE(is_zero_at_every_angle(chain));
}

}  // namespace
}  // namespace heraldgauge::reference
