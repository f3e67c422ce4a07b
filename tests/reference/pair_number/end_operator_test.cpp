#include "reference/pair_number/end_operator.hpp"

#include <gtest/gtest.h>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Ask;
using model::Rational;
using test::Random;

constexpr Precision bits = 192;
constexpr long cut = 6;
const Ask silent{Ask::Kind::silent};
const Ask clicks{Ask::Kind::clicks};

EndPlace random_end(Random& random) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 0;
  const model::Chain chain = test::random_chain(random, recipe);
  return {chain.right_end, chain.right_arms[0].transmittance};
}

// n photons, all H: each registers at plus with probability k cos^2, at cross with k' sin^2.
TEST(EndOperator, IsBinomialForOnePolarisation) {
  test::for_each_case(10, 21, [](Random& random) {
    const EndPlace place = random_end(random);
    const SquaredDirection direction = squared_direction(place.end.analyser_deg, bits);
    const auto of = [](const model::Real& value) { return enclose(value, bits); };
    const auto& [plus, cross] = place.end.detectors;
    const Interval at_plus = of(plus.registering_probability() * place.transmittance) * direction.cosine_squared;
    const Interval at_cross = of(cross.registering_probability() * place.transmittance) * direction.sine_squared;
    const SectorStack stack = end_elements(place, Side::right, {clicks, silent}, place.end.analyser_deg, cut, 0, bits);
    const Interval one(1L, bits);
    for (long n = 0; n <= cut; ++n) {
      const auto photons = static_cast<unsigned long>(n);
      const Interval expected = of(model::Real(1) - cross.dark_probability) *
                                (power(one - at_cross, photons) -
                                 of(model::Real(1) - plus.dark_probability) * power(one - at_plus - at_cross, photons));
      EXPECT_TRUE(overlap(stack[0](n, 0), expected)) << n;
      EXPECT_LT(stack[0](n, 0).log2_width(), -180);
    }
  });
}

TEST(EndOperator, PatternsAddUpToTheIdentity) {
  test::for_each_case(10, 22, [](Random& random) {
    EndPlace place = random_end(random);
    if (random() % 2 == 0) place.end.background = {Rational(1, 5), 3};
    for (const Side side : {Side::left, Side::right}) {
      std::vector<SectorStack> stacks;
      for (const EndAsk& ask :
           {EndAsk{silent, silent}, EndAsk{silent, clicks}, EndAsk{clicks, silent}, EndAsk{clicks, clicks}}) {
        stacks.push_back(end_elements(place, side, ask, place.end.analyser_deg, cut, 3, bits));
      }
      for (std::size_t sector = 0; sector <= 3; ++sector) {
        for (long a = 0; a + static_cast<long>(sector) <= cut; ++a) {
          const Interval sum =
              stacks[0][sector](a, 0) + stacks[1][sector](a, 0) + stacks[2][sector](a, 0) + stacks[3][sector](a, 0);
          EXPECT_TRUE(sum.contains(sector == 0 ? 1 : 0)) << sector << " " << a;
          EXPECT_LT(sum.log2_width(), -150);
        }
      }
    }
  });
}

TEST(EndOperator, LeavesAnUnwatchedEndAlone) {
  Random random(23);
  const SectorStack stack = end_elements(random_end(random), Side::left, {}, 17, cut, 2, bits);
  EXPECT_EQ(stack[0](2, 3).lower(), 1);
  EXPECT_EQ(stack[0](2, 3).upper(), 1);
  EXPECT_TRUE(stack[1](2, 2).is_exactly_zero());
}

// The Fourier sum at one angle is the element at that angle.
TEST(EndOperator, TurnsAsItsFourierSumSays) {
  test::for_each_case(5, 24, [](Random& random) {
    const EndPlace place = random_end(random);
    const Interval phi = Interval(Rational(place.end.analyser_deg / 90), bits) * pi(bits);
    const SectorStack fixed =
        end_elements(place, Side::right, {clicks, silent}, place.end.analyser_deg, cut, cut, bits);
    for_each_turning_element(
        place, {clicks, silent}, cut, cut, bits, [&](long sector, long a, long b, const Interval* harmonics) {
          Interval sum = sector % 2 == 0 ? harmonics[0] : Interval(bits);
          for (long q = 1; q <= cut; ++q) {
            const Interval wave = sector % 2 == 0 ? cosine(phi * q) : sine(phi * q);
            sum += harmonics[q] * wave * 2L;
          }
          if ((sector + 1) / 2 % 2 != 0) sum = -sum;  // i^D, or i^(D+1) with the sine's i
          EXPECT_TRUE(overlap(sum, fixed[static_cast<std::size_t>(sector)](a, b))) << sector << " " << a << " " << b;
        });
  });
}

TEST(EndOperator, KnowsWhenPolarisationsStayApart) {
  Random random(25);
  EndPlace place = random_end(random);
  EXPECT_TRUE(keeps_polarisations(place, {clicks, silent}, 270));
  EXPECT_FALSE(keeps_polarisations(place, {clicks, silent}, 45));
  EXPECT_TRUE(keeps_polarisations(place, {}, 45));
  place.transmittance = 0;
  EXPECT_TRUE(keeps_polarisations(place, {clicks, silent}, 45));
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
