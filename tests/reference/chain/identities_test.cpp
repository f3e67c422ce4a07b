// Identities of the model, in exact rationals: what must be equal is equal to the last bit, and is not equal as soon as
// its condition fails.
#include <gtest/gtest.h>

#include "tests/support/certified.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

using model::Chain;
using model::Herald;
using model::Rational;
using model::Real;

ChainRecipe recipe(int smallest, int largest) {
  ChainRecipe recipe;
  recipe.smallest_station_count = smallest;
  recipe.largest_station_count = largest;
  recipe.mixed_heralds = false;
  return recipe;
}

// Analysers at rational double angles, unequal at the two ends.
Chain chain_at_rational_angles(Random& random, const ChainRecipe& recipe) {
  Chain chain = random_chain(random, recipe);
  chain.left_end.analyser_deg = 30;
  chain.right_end.analyser_deg = 60;
  return chain;
}

std::string end_pattern(int bits) { return model::name_of({model::QuantityKind::end_pattern, bits}); }

TEST(Identities, TheSixteenEndPatternsSumToOne) {
  for_each_case(4, 801, [](Random& random) {
    Chain chain = chain_at_rational_angles(random, recipe(0, 2));
    for (model::Station& station : chain.stations) station.herald = Herald::either;
    Rational total = 0;
    for (int bits = 0; bits < 16; ++bits) total += exactly(chain, end_pattern(bits));
    EXPECT_EQ(total, 1) << describe_chain(chain);
  });
}

TEST(Identities, TheMirroredChainHasTheMirroredProbabilities) {
  for_each_case(4, 802, [](Random& random) {
    Chain chain = chain_at_rational_angles(random, recipe(1, 2));
    for (model::Station& station : chain.stations) station.herald = static_cast<Herald>(random() % 2);
    const Chain mirror = mirrored(chain);
    EXPECT_EQ(exactly(chain, "herald_probability"), exactly(mirror, "herald_probability"));
    EXPECT_EQ(exactly(chain, "gain"), exactly(mirror, "gain"));
    EXPECT_EQ(exactly(chain, "qber_rectilinear"), exactly(mirror, "qber_rectilinear"));
    for (const int bits : {0b1001, 0b1010, 0b1101}) {
      const int reversed = (bits & 3) << 2 | bits >> 2;
      EXPECT_EQ(exactly(chain, end_pattern(bits)), exactly(mirror, end_pattern(reversed))) << bits;
    }
    EXPECT_NE(exactly(chain, end_pattern(0b1001)), exactly(chain, end_pattern(0b0110)));
  });
}

// A chain of one station with psi+; `alike` copies detectors onto others.
template <class Alike>
Chain one_station(Random& random, Alike alike) {
  Chain chain = chain_at_rational_angles(random, recipe(1, 1));
  alike(chain.stations[0].detectors);
  if (chain.stations[0].indistinguishability.is_zero()) chain.stations[0].indistinguishability = Real(Rational(2, 3));
  return chain;
}

Rational joint(const Chain& chain, const std::string& station) {
  return exactly(chain, pattern({station}, "10", "10"));
}

// {cH,cV} ~ {dH,dV} and {cH,dV} ~ {cV,dH} if cH = dH and cV = dV; H may differ from V, arms and v are free.
TEST(Identities, ExchangingTheOutputsOfAStationNeedsAlikeDetectorsInEachPolarisation) {
  for_each_case(4, 803, [](Random& random) {
    const Chain alike =
        one_station(random, [](auto& on) { on[model::dH] = on[model::cH], on[model::dV] = on[model::cV]; });
    EXPECT_EQ(joint(alike, "1100"), joint(alike, "0011"));
    EXPECT_EQ(joint(alike, "1001"), joint(alike, "0110"));
    const Chain unlike = one_station(random, [](auto& on) { on[model::dH] = on[model::cH]; });
    EXPECT_NE(joint(unlike, "1100"), joint(unlike, "0011"));
    EXPECT_NE(joint(unlike, "1001"), joint(unlike, "0110"));
  });
}

// {cH,dV} is {cH,cV} with the sign of V reversed at one end, if cV = dV.
TEST(Identities, PsiMinusIsPsiPlusWithTheRightAngleReversedIfVDetectorsAreAlike) {
  for_each_case(4, 804, [](Random& random) {
    Chain alike = one_station(random, [](auto& on) { on[model::dV] = on[model::cV]; });
    Chain unlike = one_station(random, [](auto&) {});
    const auto reversed = [](Chain chain) {
      chain.right_end.analyser_deg = -chain.right_end.analyser_deg;
      return chain;
    };
    EXPECT_EQ(joint(alike, "1100"), joint(reversed(alike), "1001"));
    EXPECT_NE(joint(alike, "1100"), joint(alike, "1001"));  // without the correction the signs differ
    EXPECT_NE(joint(unlike, "1100"), joint(reversed(unlike), "1001"));
  });
}

// P(psi+) = P(psi-) if one polarisation has alike detectors; then "either" has 2^N times the probability and the same
// conditionals after the correction.
TEST(Identities, EitherDoublesTheHeraldIfOnePolarisationHasAlikeDetectors) {
  for_each_case(3, 805, [](Random& random) {
    Chain chain = chain_at_rational_angles(random, recipe(1, 2));
    for (model::Station& station : chain.stations) station.detectors[model::dV] = station.detectors[model::cV];
    const auto with = [&](Herald herald) {
      Chain changed = chain;
      for (model::Station& station : changed.stations) station.herald = herald;
      return changed;
    };
    const Rational psi_plus = exactly(with(Herald::psi_plus), "herald_probability");
    EXPECT_EQ(psi_plus, exactly(with(Herald::psi_minus), "herald_probability"));
    EXPECT_EQ(exactly(with(Herald::either), "herald_probability"), psi_plus * (chain.station_count() == 1 ? 2 : 4));
    for (const std::string quantity : {"gain", "qber_rectilinear", "end_pattern_1010"}) {
      EXPECT_EQ(exactly(with(Herald::either), quantity), exactly(with(Herald::psi_plus), quantity)) << quantity;
    }
    chain.stations[0].detectors[model::dV].efficiency = Real(Rational(1, 97));
    chain.stations[0].detectors[model::dH].efficiency = Real(Rational(3, 89));
    EXPECT_NE(exactly(with(Herald::psi_plus), "herald_probability"),
              exactly(with(Herald::psi_minus), "herald_probability"));
  });
}

// Without interference no phase survives a station: the right angle's sign does not matter, and the diagonal error is
// 1/2 with alike detectors at the ends.
TEST(Identities, WithoutInterferenceAStationLeavesNoPhase) {
  for_each_case(3, 806, [](Random& random) {
    Chain chain = one_station(random, [](auto&) {});
    for (model::End* end : {&chain.left_end, &chain.right_end}) end->detectors[1] = end->detectors[0];
    EXPECT_NE(exactly(chain, "qber_diagonal"), Rational(1, 2));
    chain.stations[0].indistinguishability = Real(0);
    EXPECT_EQ(exactly(chain, "qber_diagonal"), Rational(1, 2));
    Chain reversed = chain;
    reversed.right_end.analyser_deg = -reversed.right_end.analyser_deg;
    EXPECT_EQ(joint(chain, "1100"), joint(reversed, "1100"));
    EXPECT_EQ(joint(chain, "1001"), joint(reversed, "1001"));
  });
}

// All vacuum: dark events alone, every factor by hand.
TEST(Identities, VacuumSourcesClickByDarkEventsAlone) {
  for_each_case(3, 807, [](Random& random) {
    Chain chain = chain_at_rational_angles(random, recipe(1, 2));
    for (model::Source& source : chain.sources) source.pair_parameter = Real(0);
    Rational herald = 1;
    for (const model::Station& station : chain.stations) {
      const auto dark = [&](std::size_t j) { return station.detectors[j].dark_probability.rational(); };
      const auto exactly_these = [&](std::size_t a, std::size_t b) {
        Rational product = 1;
        for (std::size_t j = 0; j < 4; ++j) product *= j == a || j == b ? dark(j) : Rational(1 - dark(j));
        return product;
      };
      herald *= exactly_these(model::cH, model::cV) + exactly_these(model::dH, model::dV);
    }
    EXPECT_EQ(exactly(chain, "herald_probability"), herald);
  });
}

// Efficiency enters with the transmittance before it: at an end eta t is one number; in a station, where both arms meet
// the same detectors, a factor moved from all detectors to both arms changes nothing.
TEST(Identities, EfficiencyAndTransmittanceTradeWhereTheyMeet) {
  for_each_case(3, 808, [](Random& random) {
    Chain chain = chain_at_rational_angles(random, recipe(1, 1)), moved = chain;
    const Real half(Rational(1, 2));
    for (model::Detector& on : moved.left_end.detectors) on.efficiency = on.efficiency * half;
    chain.left_arms[0].transmittance = chain.left_arms[0].transmittance * half;
    for (model::Detector& on : moved.stations[0].detectors) on.efficiency = on.efficiency * half;
    chain.right_arms[0].transmittance = chain.right_arms[0].transmittance * half;
    chain.left_arms[1].transmittance = chain.left_arms[1].transmittance * half;
    EXPECT_EQ(joint(chain, "1100"), joint(moved, "1100"));
    EXPECT_EQ(exactly(chain, "herald_probability"), exactly(moved, "herald_probability"));
  });
}

// A blocked arm at the left end: only dark events there, independent of everything else.
TEST(Identities, ABlockedEndClicksByDarkEventsIndependently) {
  for_each_case(3, 809, [](Random& random) {
    Chain chain = chain_at_rational_angles(random, recipe(1, 1));
    chain.left_arms[0].transmittance = Real(0);
    const auto& on = chain.left_end.detectors;
    const Rational plus = on[0].dark_probability.rational(), cross = on[1].dark_probability.rational();
    EXPECT_EQ(exactly(chain, pattern({"1100"}, "10", "10")),
              plus * (1 - cross) * exactly(chain, pattern({"1100"}, "**", "10")));
  });
}

}  // namespace
}  // namespace heraldgauge::test
