// The fast evaluator against certified enclosures on many chains whose inputs are exact binary64 numbers. A few of each
// kind in every run; the recorded campaigns are the same tests with more effort (DEVELOPERS.md has the figures):
//
//   HERALDGAUGE_TEST_EFFORT=500 heraldgauge_fast_tests --gtest_filter=FastCampaign.UpToThreeStations

#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "tests/fast/campaign.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

using model::Quantity;
using model::QuantityKind;
using model::Rational;
using model::Real;

// Losses to 1e-4 in every arm and every detector, sources from 1e-6 to 0.4, both dark models, free angles, mixed
// heralds.
ChainRecipe wide_recipe(int smallest_station_count, int largest_station_count) {
  ChainRecipe recipe;
  recipe.smallest_station_count = smallest_station_count;
  recipe.largest_station_count = largest_station_count;
  recipe.smallest_lam = 1e-6;
  recipe.largest_lam = 0.4;
  recipe.smallest_transmission = 1e-4;
  return recipe;
}

void make_detectors_alike(model::Chain& chain) {
  for (model::Station& station : chain.stations) station.detectors.fill(station.detectors[0]);
  chain.left_end.detectors.fill(chain.left_end.detectors[0]);
  chain.right_end.detectors.fill(chain.right_end.detectors[0]);
}

// Half of the chains with everything unlike; a quarter with detectors alike at each place, a quarter with everything
// alike.
model::Chain draw(Random& random, ChainRecipe recipe) {
  const auto kind = random() % 4;
  recipe.all_alike = kind == 0;
  model::Chain chain = random_chain(random, recipe);
  if (kind == 1) make_detectors_alike(chain);
  return chain;
}

reference::Request request_for(std::vector<Quantity> quantities, int digits = 20) {
  reference::Request request;
  request.quantities = std::move(quantities);
  request.digits = digits;
  request.intervals_only = true;
  return request;
}

TEST(FastCampaign, AlikeTrunkOfThreeStations) {
  Campaign campaign("alike trunk of three stations", 1e-12);
  campaign.add(alike_chain(3, "1/100", "1/10", "1/2", "1/1000000"), request_for(model::all_quantities(false)));
  EXPECT_EQ(campaign.compared(), static_cast<int>(model::all_quantities(false).size()));
  EXPECT_EQ(campaign.wide_bounds(), 0);
}

TEST(FastCampaign, UpToThreeStations) {
  Campaign campaign("up to three stations", 1e-12);
  for_each_case(20, 20261201, [&](Random& random) {
    campaign.add(draw(random, wide_recipe(0, 3)), request_for(model::all_quantities(false)));
  });
  EXPECT_GT(campaign.compared(), 20 * campaign.declined());
}

TEST(FastCampaign, FourToSixStations) {
  Campaign campaign("four to six stations", 1e-12);
  for_each_case(3, 20261202, [&](Random& random) {
    campaign.add(draw(random, wide_recipe(4, 6)), request_for(model::all_quantities(false)));
  });
  EXPECT_GT(campaign.compared(), 20 * campaign.declined());
}

TEST(FastCampaign, TwelveStations) {
  Campaign campaign("twelve stations", 1e-12);
  for_each_case(1, 20261203, [&](Random& random) {
    reference::Request request = request_for(model::all_quantities(false));
    request.route = reference::RouteChoice::pair_number;
    campaign.add(draw(random, wide_recipe(12, 12)), request);
  });
  EXPECT_GT(campaign.compared(), 20 * campaign.declined());
}

// Twenty to `largest` stations, evenly by the logarithm.
void run_long_chains(Campaign& campaign, int cases, std::uint64_t seed, double largest) {
  for_each_case(cases, seed, [&](Random& random) {
    const int stations = static_cast<int>(log_uniform(random, 20, largest));
    ChainRecipe recipe = wide_recipe(stations, stations);
    recipe.largest_lam = 0.1;
    reference::Request request = request_for({{QuantityKind::herald_probability},
                                              {QuantityKind::trials_per_herald},
                                              {QuantityKind::gain},
                                              {QuantityKind::qber_rectilinear}},
                                             15);
    request.route = reference::RouteChoice::pair_number;
    campaign.add(draw(random, recipe), request);
  });
}

TEST(FastCampaign, LongChains) {
  const int largest = std::min(1000, scaled(100));  // a thousand unlike stations take the reference half a minute
  Campaign campaign("twenty to " + std::to_string(largest) + " stations", 1e-10);
  run_long_chains(campaign, 2, 20261204, largest);
  EXPECT_EQ(campaign.declined(), 0);
}

// Efficiencies, transmittances and indistinguishabilities that are 1, just below 1, or 0; analysers at special angles
// and just beside them; sources that never fire.
class Edges {
 public:
  explicit Edges(Random& random) : random_(random) {}

  void apply(model::Chain& chain) {
    for (model::Source& source : chain.sources) {
      if (random_() % 8 == 0) source.pair_parameter = Real(0);
    }
    for (auto* arms : {&chain.left_arms, &chain.right_arms}) {
      for (model::Arm& arm : *arms) move(arm.transmittance);
    }
    for (model::Station& station : chain.stations) {
      move(station.indistinguishability);
      for (model::Detector& detector : station.detectors) move(detector);
    }
    for (model::End* end : {&chain.left_end, &chain.right_end}) {
      for (model::Detector& detector : end->detectors) move(detector);
      turn(end->analyser_deg);
    }
  }

 private:
  void move(Real& probability) {
    switch (random_() % 8) {
      case 0:
        probability = Real(1);
        break;
      case 1:
        probability = Rational(1 - tiny());
        break;
      case 2:
        if (random_() % 3 == 0) probability = Real(0);
        break;
      default:
        break;
    }
  }
  void move(model::Detector& detector) {
    move(detector.efficiency);
    if (random_() % 3 == 0) detector.dark_probability = Real(0);
  }
  void turn(Rational& degrees) {
    static constexpr std::array special{-45, 0, 30, 45, 60, 90, 135};
    if (random_() % 2 == 0) degrees = special[random_() % special.size()];
    if (random_() % 3 == 0) degrees += Rational(tiny());
  }
  // A power of two from 1/2 to 2^-40.
  double tiny() { return std::ldexp(1.0, -1 - static_cast<int>(random_() % 40)); }

  Random& random_;
};

TEST(FastCampaign, EdgesOfTheRanges) {
  Campaign campaign("edges of the ranges", 1e-12);
  for_each_case(15, 20261205, [&](Random& random) {
    model::Chain chain = draw(random, wide_recipe(0, 2));
    Edges(random).apply(chain);
    reference::Request request = request_for(model::all_quantities(false));
    request.intervals_only = false;         // exact zeros are then found where angles allow
    request.largest_precision_bits = 3000;  // and not chased for long where they do not
    campaign.add(chain, request);
  });
}

}  // namespace
}  // namespace heraldgauge::test
