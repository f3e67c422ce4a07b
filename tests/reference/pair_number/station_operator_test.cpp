#include "reference/pair_number/station_operator.hpp"

#include <gtest/gtest.h>

#include "reference/pair_number/dark_weights.hpp"
#include "reference/pair_number/place_bound.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Ask;
using model::Rational;
using test::Random;

constexpr Precision bits = 192;

StationPlace random_place(Random& random, bool alike) {
  test::ChainRecipe recipe;
  recipe.smallest_station_count = recipe.largest_station_count = 1;
  recipe.all_alike = alike;
  const model::Chain chain = test::random_chain(random, recipe);
  return {chain.stations[0], chain.right_arms[0].transmittance, chain.left_arms[1].transmittance,
          model::accepted_outcomes(chain.stations[0].herald)};
}

// <.| H part |.> <.| V part |.> added over the products.
Interval element(const std::vector<Product>& products, long a, long b, long c, long d) {
  Interval sum(bits);
  for (const Product& product : products) sum += (*product.horizontal)(a, c) * product.vertical(b, d);
  return sum;
}

// "First detector clicks, second silent" as the difference of two no-click operators.
Matrix difference_form(const StationPlace& place, std::array<std::size_t, 2> detectors, long sector, long cut) {
  const Ask silent{Ask::Kind::silent};
  Matrix result(cut - sector + 1, cut - sector + 1, 2 * bits);
  for (const bool both : {false, true}) {
    const bool c_clicks = detectors[0] < detectors[1];
    const std::size_t c = std::min(detectors[0], detectors[1]);
    const std::size_t d = std::max(detectors[0], detectors[1]);
    const Ask clicking = both ? silent : Ask{};
    const PolarisationAsk ask{{place.station.detectors[c], place.station.detectors[d]},
                              {c_clicks ? clicking : silent, c_clicks ? silent : clicking}};
    const DetectorGroup group{{ask.detectors[0], ask.detectors[1]}, {ask.asks[0], ask.asks[1]}, {}, 4};
    const Interval dark = dark_weights(group, 2 * bits)[0].weight;
    for_each_gamma_element(CountAlgebra({}, 0, 2 * bits), station_modes(ask, place, 2 * bits),
                           {cut, cut, 2 * cut, sector}, [&](long at, long alpha, long beta, const Interval* gamma) {
                             if (at != sector) return;
                             result(alpha, beta) += both ? -(dark * *gamma) : dark * *gamma;
                           });
  }
  return result;
}

TEST(StationOperator, EqualsTheDifferenceOfNoClickOperators) {
  test::for_each_case(10, 11, [](Random& random) {
    StationPlace place = random_place(random, random() % 2 == 0);
    place.outcomes = {model::accepted_outcomes(model::Herald::psi_minus)[0]};  // cH and dV
    const long cut = 5;
    const StationOperator station(place, cut, cut, 3, bits);
    for (long sector = 0; sector <= 3; ++sector) {
      const auto products = station.products(sector, Outcomes::minus_only);
      const Matrix horizontal = difference_form(place, {model::cH, model::dH}, sector, cut);
      const Matrix vertical = difference_form(place, {model::dV, model::cV}, sector, cut);
      for (long a = 0; a <= cut - sector; ++a) {
        for (long b = 0; b <= cut - sector; ++b) {
          const Interval expected = horizontal(a, b) * vertical(b, a);
          EXPECT_TRUE(overlap(element(products, a, b, b, a), expected)) << sector << " " << a << " " << b;
        }
      }
    }
  });
}

TEST(StationOperator, NeverSubtractsWhereDetectorsAreAlike) {
  test::for_each_case(10, 12, [](Random& random) {
    StationPlace place = random_place(random, true);
    place.outcomes = model::accepted_outcomes(model::Herald::psi_plus);
    const StationOperator station(place, 12, 12, 0, bits);
    const auto products = station.products(0, Outcomes::corrected);
    ASSERT_EQ(products.size(), 1u);
    for (long a = 1; a <= 12; ++a) {
      const Interval value = element(products, a, 1, a, 1);
      EXPECT_LT(value.log2_width(), value.log2_mignitude() - static_cast<double>(bits) + 8);
    }
  });
}

// Two photons of one polarisation, one from either side, at a lossless station without noise: they leave together
// through c with probability (1 + v)/4, and so through d.
TEST(StationOperator, ShowsTwoPhotonInterference) {
  StationPlace place;
  place.station.detectors.fill(model::Detector{Rational(1), Rational(0)});
  place.station.indistinguishability = Rational(3, 5);
  place.first_transmittance = place.second_transmittance = Rational(1);
  const Ask silent{Ask::Kind::silent};
  place.outcomes = {{{Ask{Ask::Kind::clicks}, Ask{}, silent, Ask{}}, false}};
  const StationOperator station(place, 2, 2, 0, bits);
  const auto products = station.products(0, Outcomes::corrected);
  const Interval together = element(products, 1, 0, 1, 0);
  EXPECT_TRUE(together.contains(Rational(2, 5)));
  EXPECT_LT(together.log2_width(), -180);
}

TEST(StationOperator, PsiMinusReversesOddSectorsWhereDetectorsAreAlike) {
  test::for_each_case(5, 13, [](Random& random) {
    StationPlace place = random_place(random, true);
    place.outcomes = model::accepted_outcomes(model::Herald::either);
    const StationOperator station(place, 4, 4, 3, bits);
    for (long sector = 0; sector <= 3; ++sector) {
      const auto plus = station.products(sector, Outcomes::plus_only);
      const auto minus = station.products(sector, Outcomes::minus_only);
      const auto corrected = station.products(sector, Outcomes::corrected);
      const Interval value = element(plus, 1, 0, 1, 0);
      const Interval other = element(minus, 1, 0, 1, 0);
      EXPECT_TRUE(overlap(value, sector % 2 == 0 ? other : -other)) << sector;
      EXPECT_TRUE(overlap(element(corrected, 1, 0, 1, 0), value * 2L)) << sector;
    }
  });
}

TEST(PlaceBound, IsNotBelowTheOperator) {
  test::for_each_case(20, 14, [](Random& random) {
    StationPlace place = random_place(random, random() % 2 == 0);
    if (random() % 3 == 0) place.station.background = {Rational(1, 10), 2};
    const long cut = 4;
    const StationOperator station(place, cut, cut, 0, bits);
    const auto products = station.products(0, Outcomes::corrected);
    const Matrix w = PlaceBound(place, bits).table(cut, cut);
    for (long a = 0; a <= cut; ++a) {
      for (long b = 0; a + b <= cut; ++b) {
        for (long c = 0; c <= cut; ++c) {
          for (long d = 0; c + d <= cut; ++d) {
            EXPECT_FALSE(certainly_less(w(a + b, c + d), element(products, a, b, c, d))) << a << b << c << d;
          }
        }
      }
    }
  });
}

// One photon from the first side, two clicks wanted: by the photon and a dark event, or by two dark events.
TEST(PlaceBound, IsTheFormulaOfItsComment) {
  StationPlace place;
  place.station.detectors.fill(model::Detector{Rational(1, 2), Rational(1, 100)});
  place.first_transmittance = Rational(1, 5);
  place.second_transmittance = Rational(1, 3);
  place.outcomes = model::accepted_outcomes(model::Herald::psi_plus);
  const PlaceBound bound(place, bits);
  EXPECT_EQ(bound.order(), 2);
  const Rational quiet = Rational(99, 100) * Rational(99, 100);
  const Rational dark = Rational(1, 100);
  const Matrix w = bound.table(1, 1);
  EXPECT_TRUE(w(0, 0).contains(2 * quiet * dark * dark));
  EXPECT_TRUE(w(1, 0).contains(2 * quiet * (dark * dark + 2 * dark * Rational(1, 10))));
  EXPECT_TRUE(w(1, 1).contains(2 * quiet * (dark * dark + 2 * dark * Rational(4, 15) + Rational(1, 60))));
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
