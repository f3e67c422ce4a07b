// The route as a whole: oracles worked out by hand, limits and symmetries.
#include "reference/pair_number/route.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

using model::Ask;
using model::Rational;
using test::Random;

constexpr Accuracy accuracy{160, -160};
const Ask silent{Ask::Kind::silent};
const Ask clicks{Ask::Kind::clicks};

// Noiseless ideal pairs, everything lossless but what a test changes.
model::Chain ideal_chain(std::size_t stations, model::Herald herald) {
  model::Chain chain = test::alike_chain(stations, "1/3", "1", "1", "0");
  for (model::Source& source : chain.sources) source.kind = model::SourceKind::ideal_pair;
  for (model::Station& station : chain.stations) station.herald = herald;
  return chain;
}

void expect_near(const Interval& value, const Rational& exact) {
  EXPECT_TRUE(value.contains(exact)) << exact.get_d();
  EXPECT_LT(value.log2_width(), -140);
}

EndTable<Interval> table_of(const model::Chain& chain, Basis basis) {
  return make_pair_number_route(chain)->ends(basis, accuracy).value;
}

// One pair of phi+: plus and plus with probability cos^2(difference)/2.
TEST(PairNumberRoute, OnePairByHand) {
  model::Chain chain = ideal_chain(0, model::Herald::psi_plus);
  chain.left_end.analyser_deg = 20;
  chain.right_end.analyser_deg = 80;
  chain.left_arms[0].transmittance = Rational(1, 2);
  chain.right_end.detectors[model::cross].efficiency = Rational(1, 5);
  const auto joint = table_of(chain, Basis::analyser).joint;
  expect_near(joint[2][2], Rational(1, 3) * Rational(1, 2) * Rational(1, 8));
  expect_near(joint[2][1], Rational(1, 3) * Rational(1, 2) * Rational(3, 8) * Rational(1, 5));
  expect_near(joint[2][0], Rational(1, 3) * Rational(1, 2) * Rational(3, 8) * Rational(4, 5));
  EXPECT_TRUE(joint[3][0].is_exactly_zero());
  const auto bounded = make_pair_number_route(chain)->herald(accuracy);
  expect_near(bounded.value, 1);
  EXPECT_EQ(bounded.cutoff, std::vector<long>{1});
  EXPECT_TRUE(bounded.tail.is_exactly_zero());
}

// Two pairs swapped without loss: each Bell state of the station has probability 1/4; psi states differ in H and V, and
// agree at 45 degrees once psi- is corrected. Unlike detectors at the right end: its bits are exchanged instead.
TEST(PairNumberRoute, OneSwapByHand) {
  for (const bool unlike : {false, true}) {
    for (const auto& [herald, heralds] :
         {std::pair{model::Herald::psi_plus, 1}, {model::Herald::psi_minus, 1}, {model::Herald::either, 2}}) {
      SCOPED_TRACE(testing::Message() << "herald " << static_cast<int>(herald) << " unlike " << unlike);
      model::Chain chain = ideal_chain(1, herald);
      const Rational eta_plus(1), eta_cross = unlike ? Rational(1, 2) : Rational(1);
      chain.right_end.detectors[model::cross].efficiency = eta_cross;
      const Rational each = Rational(1, 9) * Rational(1, 8);
      expect_near(make_pair_number_route(chain)->herald(accuracy).value, heralds * 2 * each);
      const auto rectilinear = table_of(chain, Basis::rectilinear).joint;
      expect_near(rectilinear[2][1], heralds * each * eta_cross);
      expect_near(rectilinear[1][2], heralds * each * eta_plus);
      expect_near(rectilinear[2][2], 0);
      const auto diagonal = table_of(chain, Basis::diagonal).joint;
      const int kept = herald == model::Herald::psi_minus ? 0 : 1;      // strings with no psi-
      const int exchanged = herald == model::Herald::psi_plus ? 0 : 1;  // with one: left plus goes with right cross
      expect_near(diagonal[2][2], each * (kept * eta_plus + exchanged * eta_cross));
      expect_near(diagonal[1][1], each * (kept * eta_cross + exchanged * eta_plus));
      expect_near(diagonal[2][1], 0);
      chain.left_end.analyser_deg = chain.right_end.analyser_deg = 45;
      const auto analyser =
          table_of(chain, Basis::analyser).joint;  // the right analyser is turned to -45 degrees instead
      expect_near(analyser[2][2], heralds * each * eta_plus);
      expect_near(analyser[2][1], 0);
    }
  }
}

TEST(PairNumberRoute, PatternsAreNotCorrected) {
  model::Chain chain = ideal_chain(1, model::Herald::either);
  chain.left_end.analyser_deg = chain.right_end.analyser_deg = 45;
  model::Pattern pattern;
  pattern.left = pattern.right = {clicks, silent};
  pattern.stations = {model::accepted_outcomes(model::Herald::psi_minus)[0].detectors};
  expect_near(make_pair_number_route(chain)->pattern(pattern, accuracy).value, 0);
  pattern.right = {silent, clicks};
  expect_near(make_pair_number_route(chain)->pattern(pattern, accuracy).value, Rational(1, 9) * Rational(1, 16));
}

TEST(PairNumberRoute, WithoutPairsOnlyDarkEventsHerald) {
  const model::Chain chain = test::alike_chain(2, "0", "1/10", "1/5", "1/10");
  const auto herald = make_pair_number_route(chain)->herald(accuracy);
  const Rational one_station = 2 * Rational(1, 100) * Rational(81, 100);
  expect_near(herald.value, one_station * one_station);
  EXPECT_TRUE(herald.tail.is_exactly_zero());
}

// The background's modes fire the two detectors of an end together.
TEST(PairNumberRoute, SharedBackgroundByHand) {
  model::Chain chain = test::alike_chain(0, "0", "1/10", "1/5", "1/10");
  chain.left_end.background = {Rational(10), 2};
  const auto joint = table_of(chain, Basis::rectilinear).joint;
  const Rational both_silent = Rational(81, 100) / 4;            // (1 + 10 * 2/5 / 4)^-2
  const Rational one_silent = Rational(9, 10) / Rational(9, 4);  // (1 + 10 * 1/5 / 4)^-2
  expect_near(joint[0][0], both_silent * Rational(81, 100));
  expect_near(joint[1][0], (one_silent - both_silent) * Rational(81, 100));
  expect_near(joint[3][0], (1 - 2 * one_silent + both_silent) * Rational(81, 100));
}

model::Chain some_chain(Random& random, bool free_angles) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 2;
  recipe.largest_lam = 0.05;
  recipe.free_angles = free_angles;
  return test::random_chain(random, recipe);
}

TEST(PairNumberRoute, EndPatternsAddUpToTheHerald) {
  test::for_each_case(4, 51, [](Random& random) {
    const model::Chain chain = some_chain(random, true);
    SCOPED_TRACE(test::describe_chain(chain));
    const Interval herald = make_pair_number_route(chain)->herald(accuracy).value;
    for (const Basis basis : {Basis::analyser, Basis::rectilinear, Basis::diagonal}) {
      Interval sum(accuracy.bits);
      for (const auto& row : table_of(chain, basis).joint) {
        for (const Interval& entry : row) sum += entry;
      }
      EXPECT_TRUE(overlap(sum, herald));
      EXPECT_LT(sum.log2_width(), -140);
    }
  });
}

// With a tail of a hundredth of the herald every entry still contains what a far smaller tail leaves.
TEST(PairNumberRoute, CoarseEntriesContainFineOnes) {
  test::for_each_case(12, 56, [](Random& random) {
    test::ChainRecipe recipe;
    recipe.smallest_station_count = 1;
    recipe.largest_station_count = 2;
    const model::Chain chain = test::random_chain(random, recipe);
    SCOPED_TRACE(test::describe_chain(chain));
    const auto route = make_pair_number_route(chain);
    const double herald = pair_number_log2_herald(chain);
    for (const Basis basis : {Basis::analyser, Basis::rectilinear, Basis::diagonal}) {
      const auto coarse = route->ends(basis, {96, herald - 7});
      const auto fine = route->ends(basis, {160, herald - 30});
      EXPECT_LE(hull(Interval(64), coarse.tail).log2_width(), herald - 7);
      for (std::size_t left = 0; left < 4; ++left) {
        for (std::size_t right = 0; right < 4; ++right) {
          EXPECT_TRUE(overlap(coarse.value.joint[left][right], fine.value.joint[left][right])) << left << right;
        }
      }
    }
  });
}

// A right plus detector that sees next to nothing: its exchanged entries have the tail of the cross detector.
TEST(PairNumberRoute, ExchangedEntriesHaveTheTailOfTheOtherDetector) {
  model::Chain chain = test::alike_chain(1, "1/5", "1", "1", "0");
  chain.stations[0].herald = model::Herald::psi_minus;
  chain.right_end.detectors[model::plus].efficiency = Rational(1, 1000000);
  const auto route = make_pair_number_route(chain);
  const auto coarse = route->ends(Basis::diagonal, {96, -8}).value.joint;
  const auto fine = route->ends(Basis::diagonal, {160, -60}).value.joint;
  for (std::size_t left = 0; left < 4; ++left) {
    for (std::size_t right = 0; right < 4; ++right) EXPECT_TRUE(overlap(coarse[left][right], fine[left][right]));
  }
}

TEST(PairNumberRoute, LooksTheSameFromTheOtherEnd) {
  test::for_each_case(4, 52, [](Random& random) {
    const model::Chain chain = some_chain(random, true);
    SCOPED_TRACE(test::describe_chain(chain));
    const auto joint = table_of(chain, Basis::analyser).joint;
    const auto mirror = table_of(mirrored(chain), Basis::analyser).joint;
    for (std::size_t left = 0; left < 4; ++left) {
      for (std::size_t right = 0; right < 4; ++right) EXPECT_TRUE(overlap(joint[left][right], mirror[right][left]));
    }
  });
}

// Without interference no coherence between H and V survives: turning an analyser to its mirror angle changes nothing.
TEST(PairNumberRoute, DistinguishablePhotonsLeaveNoCoherence) {
  test::for_each_case(3, 53, [](Random& random) {
    model::Chain chain = some_chain(random, true);
    if (chain.stations.empty()) return;
    chain.stations[0].indistinguishability = Rational(0);
    const auto joint = table_of(chain, Basis::analyser).joint;
    chain.right_end.analyser_deg = -chain.right_end.analyser_deg;
    const auto turned = table_of(chain, Basis::analyser).joint;
    for (std::size_t left = 0; left < 4; ++left) {
      for (std::size_t right = 0; right < 4; ++right) EXPECT_TRUE(overlap(joint[left][right], turned[left][right]));
    }
  });
}

TEST(PairNumberRoute, TurningBothAnalysersOfOneSourceChangesNothing) {
  test::for_each_case(3, 54, [](Random& random) {
    model::Chain chain = some_chain(random, true);
    chain.stations.clear();
    chain.sources.resize(1);
    chain.left_arms.resize(1);
    chain.right_arms.resize(1);
    const auto joint = table_of(chain, Basis::analyser).joint;
    chain.left_end.analyser_deg += Rational(37, 3);
    chain.right_end.analyser_deg += Rational(37, 3);
    const auto turned = table_of(chain, Basis::analyser).joint;
    for (std::size_t left = 0; left < 4; ++left) {
      for (std::size_t right = 0; right < 4; ++right) {
        EXPECT_EQ(joint[left][right].lower(), turned[left][right].lower());
      }
    }
  });
}

// The profile at the chain's own right angle is the table's "plus, plus".
TEST(PairNumberRoute, ProfilePassesThroughTheTable) {
  test::for_each_case(4, 55, [](Random& random) {
    const model::Chain chain = some_chain(random, true);
    SCOPED_TRACE(test::describe_chain(chain));
    const AngularProfile profile = make_pair_number_route(chain)->profile(accuracy);
    const bool single = chain.station_count() == 0;
    const Rational degrees = chain.right_end.analyser_deg - (single ? chain.left_end.analyser_deg : Rational(0));
    const Interval phi = Interval(Rational(degrees / 90), accuracy.bits) * pi(accuracy.bits);
    Interval sum = hull(Interval(accuracy.bits), profile.tail);
    for (std::size_t q = 0; q < profile.cosine.size(); ++q) {
      const long order = static_cast<long>(q);
      sum += profile.cosine[q] * cosine(phi * order) + profile.sine[q] * sine(phi * order);
    }
    EXPECT_TRUE(overlap(sum, table_of(chain, Basis::analyser).joint[2][2]));
    EXPECT_LT(sum.log2_width(), -140);
    EXPECT_TRUE(profile.sine[0].is_exactly_zero());
    EXPECT_TRUE(profile.remainder[2].is_exactly_zero());
  });
}

// A resolving detector with dark counts: its counts exhaust what can happen, and "clicks" is all but none.
TEST(PairNumberRoute, CountsAddUp) {
  model::Chain chain = test::alike_chain(1, "1/20", "1/2", "3/5", "1/50");
  model::Detector& detector = chain.stations[0].detectors[model::cH];
  detector.kind = model::DetectorKind::resolving;
  const auto route = make_pair_number_route(chain);
  model::Pattern pattern;
  pattern.stations = {{Ask{}, clicks, silent, Ask{}}};
  const auto probability = [&](const Ask& ask) {
    pattern.stations[0][model::cH] = ask;
    return route->pattern(pattern, accuracy).value;
  };
  const Interval none = probability({Ask::Kind::counts, 0});
  EXPECT_TRUE(overlap(none, probability(silent)));
  Interval some(accuracy.bits);
  for (int count = 1; count <= 12; ++count) some += probability({Ask::Kind::counts, count});
  const Interval missing = probability(clicks) - some;
  EXPECT_TRUE(missing.is_certainly_positive());
  EXPECT_LT(missing.log2_mignitude(), -40);
  EXPECT_TRUE(overlap(none + probability(clicks), probability({})));
}

TEST(PairNumberRefusal, NamesWhatIsNotServed) {
  model::Chain chain = test::alike_chain(1, "1/20", "1/2", "3/5", "1/50");
  EXPECT_EQ(pair_number_refusal(chain), std::nullopt);
  chain.stations[0].detectors[1].kind = model::DetectorKind::resolving;
  EXPECT_EQ(pair_number_refusal(chain), std::nullopt);
  model::Pattern pattern;
  pattern.stations = {{Ask{}, Ask{Ask::Kind::counts, 1}, silent, Ask{}}};
  EXPECT_EQ(pair_number_refusal(chain, pattern), std::nullopt);
  chain.stations[0].background.photons = Rational(1, 10);
  EXPECT_NE(pair_number_refusal(chain, pattern)->find("station 1"), std::string::npos);
  chain.stations[0].detectors[1].dark_model = model::DarkModel::thermal;
  EXPECT_NE(pair_number_refusal(chain)->find("station 1"), std::string::npos);
  chain.sources[1].pair_parameter = Rational(97, 100);
  EXPECT_NE(pair_number_refusal(chain)->find("source 1"), std::string::npos);
}

TEST(PairNumberCost, GrowsAsTheWorkDoes) {
  const auto cost = [](std::size_t stations, const char* lam, bool all) {
    const model::Chain chain = test::alike_chain(stations, lam, "1/10", "1/5", "1/1000000");
    return pair_number_cost(chain, {128, pair_number_log2_herald(chain) - 100}, all);
  };
  EXPECT_NEAR(cost(20, "1/100", false) / cost(10, "1/100", false), 2, 0.5);
  EXPECT_GT(cost(10, "1/10", false), 2 * cost(10, "1/100", false));
  EXPECT_GT(cost(10, "1/100", true), 1.5 * cost(10, "1/100", false));
}

}  // namespace
}  // namespace heraldgauge::reference
