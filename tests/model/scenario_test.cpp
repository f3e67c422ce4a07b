#include <gtest/gtest.h>

#include <cmath>

#include "tests/model/scenario_support.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::model {
namespace {

TEST(Scenario, ReadsNumbersExactly) {
  const Chain chain = chain_of(base_text);
  EXPECT_EQ(chain.station_count(), 3u);
  EXPECT_EQ(chain.sources.at(3).pair_parameter, Real(exact("1/100")));
  EXPECT_EQ(chain.right_arms.at(0).transmittance, Real(exact("1/10")));
  EXPECT_EQ(chain.stations[2].detectors[dV].efficiency, Real(exact("1/2")));
  EXPECT_EQ(chain.right_end.detectors[cross].efficiency, Real(exact("1/4")));
}

TEST(Scenario, KeepsTheExactLiteralAfterCharactersBeyondAscii) {
  const std::string text = sources_and_detectors + "channel = { transmittance = 1e-400 } # \u00e9\n" +
                           "title = \"\u00e9\u4e2d\U0001f600\"; ";
  EXPECT_EQ(first_fault(text).substr(0, 9), "x.toml:6:");
  const std::string inline_table =
      "title = \"\u00e9\u4e2d\U0001f600\"\n" + sources_and_detectors +
      "[override]\n\"arm.0.left.transmittance\" = 0.3\n[[sweep]]\nkey = 'channel.transmittance' # \u00e9\n"
      "values = ['1/3', 0.1, 1e-400]";
  EXPECT_EQ(chain_of(inline_table, {}, 2).left_arms[1].transmittance, Real(exact("1e-400")));
}

TEST(Scenario, DefaultsAreThoseOfTheInterface) {
  const Chain chain = chain_of(base_text);
  const Station& station = chain.stations[0];
  EXPECT_EQ(station.herald, Herald::psi_plus);
  EXPECT_EQ(station.indistinguishability, Real(1));
  EXPECT_EQ(station.background.photons, Real(0));
  EXPECT_EQ(station.background.modes, 1);
  for (const Detector& detector : station.detectors) {
    EXPECT_EQ(detector.dark_probability, Real(0));
    EXPECT_EQ(detector.dark_model, DarkModel::independent);
    EXPECT_EQ(detector.kind, DetectorKind::threshold);
  }
  EXPECT_EQ(chain.sources[0].kind, SourceKind::squeezed);
  EXPECT_EQ(chain.left_end.analyser_deg, 0);
  EXPECT_EQ(chain.protocol.sifting, exact("1/2"));
  EXPECT_EQ(chain.protocol.error_correction_factor, exact("29/25"));
}

TEST(Scenario, Binary64MeansTheNearestDouble) {
  const Chain chain = chain_of("inputs = \"binary64\"\n" + base_text);
  EXPECT_EQ(chain.left_arms[0].transmittance, Real(Rational(0.1)));
  EXPECT_EQ(chain.protocol.error_correction_factor, Rational(1.16));
  EXPECT_EQ(chain_of(base_text, {{"inputs", "binary64"}}).left_arms[0].transmittance, Real(Rational(0.1)));
}

TEST(Scenario, ReadsEveryFormOfTheSource) {
  const auto with = [](const std::string& form) {
    return chain_of("chain.stations = 0\nchannel.transmittance = 1\nend.detector.efficiency = 1\n" + form).sources[0];
  };
  EXPECT_EQ(with("source.mean_pairs = 0.25").pair_parameter, Real(exact("1/5")));
  const Real tanh = Real::hyperbolic_tangent(Real(exact("0.3")));
  EXPECT_EQ(with("source.squeezing = 0.3").pair_parameter, tanh * tanh);
  EXPECT_EQ(with("source.kind = 'ideal-pair'\nsource.pair_probability = 1").kind, SourceKind::ideal_pair);
  EXPECT_EQ(with("source.kind = 'ideal-pair'\nsource.pair_probability = 1").pair_parameter, Real(1));
}

// 240 km at 0.2 dB/km over 8 arms and 1 dB each: 7 dB an arm.
TEST(Scenario, SplitsTheLengthOverAllArms) {
  const std::string text =
      sources_and_detectors + "channel = { length_km = 240, attenuation_db_per_km = 0.2, insertion_loss_db = 1 }";
  const Chain chain = chain_of(text);
  EXPECT_EQ(chain.left_arms[2].transmittance, Real::power_of_ten(Real(exact("-7/10"))));
  EXPECT_EQ(chain_of(text, {{"channel.insertion_loss_db", "4"}}).left_arms[2].transmittance, Real(exact("1/10")));
}

TEST(Scenario, OverridesGoFromPlaceToDetector) {
  const Chain chain =
      chain_of(base_text +
               "[override]\n'station.2.detector.efficiency' = 0.3\nstation.2.detector.cV.efficiency = 0.4\n"
               "station.1.detector.dH.dark_probability = 0.01\nend.left.detector.efficiency = 0.6\n"
               "end.left.detector.cross.efficiency = 0.7\narm.3.right.transmittance = 1\n"
               "source.1.mean_pairs = 1\nsource.2.pair_parameter = 0.2\nstation.3.herald = 'either'\n"
               "station.3.background_photons = 0.1\nend.right.background_modes = 5\n");
  const auto eta = [&](std::size_t station, StationDetector detector) {
    return chain.stations[station - 1].detectors[detector].efficiency;
  };
  EXPECT_EQ(eta(1, cV), Real(exact("0.5")));
  EXPECT_EQ(eta(2, cH), Real(exact("0.3")));
  EXPECT_EQ(eta(2, cV), Real(exact("0.4")));
  EXPECT_EQ(eta(2, dV), Real(exact("0.3")));
  EXPECT_EQ(chain.stations[0].detectors[dH].dark_probability, Real(exact("0.01")));
  EXPECT_EQ(chain.stations[0].detectors[dV].dark_probability, Real(0));
  EXPECT_EQ(chain.left_end.detectors[plus].efficiency, Real(exact("0.6")));
  EXPECT_EQ(chain.left_end.detectors[cross].efficiency, Real(exact("0.7")));
  EXPECT_EQ(chain.right_end.detectors[cross].efficiency, Real(exact("0.25")));
  EXPECT_EQ(chain.right_arms[3].transmittance, Real(1));
  EXPECT_EQ(chain.left_arms[3].transmittance, Real(exact("0.1")));
  EXPECT_EQ(chain.sources[1].pair_parameter, Real(exact("0.5")));
  EXPECT_EQ(chain.sources[2].pair_parameter, Real(exact("0.2")));
  EXPECT_EQ(chain.stations[2].herald, Herald::either);
  EXPECT_EQ(chain.stations[1].herald, Herald::psi_plus);
  EXPECT_EQ(chain.stations[2].background.photons, Real(exact("0.1")));
  EXPECT_EQ(chain.right_end.background.modes, 5);
}

TEST(Scenario, NeedsNoGeneralKeyWhereEveryPlaceIsOverridden) {
  const std::string ends = "chain.stations = 0\nend.detector.efficiency = 1\n";
  EXPECT_EQ(chain_of(ends + "[override]\nsource.0.pair_parameter = 0.1\narm.0.left.transmittance = 0.2\n"
                            "arm.0.right.transmittance = 0.3\n")
                .right_arms[0]
                .transmittance,
            Real(exact("0.3")));
  EXPECT_EQ(
      first_fault(ends + "[override]\nsource.0.pair_parameter = 0.1\narm.0.left.transmittance = 0.2\n").substr(0, 30),
      "x.toml: channel.transmittance:");
}

TEST(Scenario, DarkLawFollowsTheEfficiencyInForce) {
  const Chain chain = chain_of(base_text +
                               "end.detector.dark_scale = 1e-3\nend.detector.dark_slope = 4\n[override]\n"
                               "end.right.detector.efficiency = 0.5\nend.right.detector.plus.dark_probability = 0.5\n");
  EXPECT_EQ(chain.left_end.detectors[plus].dark_probability, Real(exact("1e-3")) * Real::exponential(Real(1)));
  EXPECT_EQ(chain.right_end.detectors[cross].dark_probability, Real(exact("1e-3")) * Real::exponential(Real(2)));
  EXPECT_EQ(chain.right_end.detectors[plus].dark_probability, Real(exact("0.5")));
}

// The efficiency is 1/4, and 80 ln 2 = 55.45177444479562475337856971...
TEST(Scenario, DecidesTheDarkLawCloseToOne) {
  const std::string law = base_text + "end.detector.dark_scale = '1/1048576'\n";
  EXPECT_EQ(first_fault(law + "end.detector.dark_slope = '55.4517744447956247533785696'"), "no fault");
  EXPECT_NE(first_fault(law + "end.detector.dark_slope = '55.4517744447956247533785698'"), "no fault");
}

TEST(Scenario, SetReplacesAndAddsSettings) {
  EXPECT_EQ(chain_of(base_text, {{"channel.transmittance", "\"3/7\""}}).left_arms[0].transmittance, Real(exact("3/7")));
  EXPECT_EQ(chain_of(base_text, {{"chain.herald", "psi-"}}).stations[1].herald, Herald::psi_minus);
  EXPECT_EQ(chain_of(base_text, {{"chain.herald", "[\"psi-\", \"psi+\", \"either\"]"}}).stations[2].herald,
            Herald::either);
  EXPECT_EQ(chain_of(base_text, {{"source.2.squeezing", "0"}}).sources[2].pair_parameter, Real(0));
  EXPECT_EQ(scenario_of(base_text, {{"ask.quantities", "key_rate"}}).quantities,
            std::vector{*find_quantity("key_rate")});
  EXPECT_EQ(chain_of(base_text + "end.detector.dark_probability = 7", {{"end.detector.dark_probability", "0.1"}})
                .left_end.detectors[plus]
                .dark_probability,
            Real(exact("0.1")));
}

TEST(Scenario, SetFaultsNameTheKey) {
  const std::string sweep = base_text + "[[sweep]]\nkey = 'channel.transmittance'\nvalues = [0.1]\n";
  EXPECT_EQ(first_fault(sweep, {{"channel.transmittance", "0.2"}}).substr(0, 45),
            "--set: channel.transmittance: is a swept key;");
  EXPECT_EQ(first_fault(base_text, {{"chain.station", "2"}}).substr(0, 39), "--set: chain.station: is an unknown key");
  EXPECT_NE(first_fault(base_text, {{"chain.station", "2"}}).find("chain.stations"), std::string::npos);
  EXPECT_NE(first_fault(base_text, {{"channel.transmittance", "1\nchain.stations = 2"}}).find("not one TOML value"),
            std::string::npos);
  EXPECT_NE(
      first_fault(base_text, {{"channel.transmittance", "0.1"}, {"channel.transmittance", "0.2"}}).find("set twice"),
      std::string::npos);
  EXPECT_NE(first_fault(base_text, {{"channel.transmittance", "1.5"}}).find("is 1.5; allowed: a number from 0 to 1"),
            std::string::npos);
}

TEST(Sweeps, MultiplyWithTheFirstSlowest) {
  const Scenario scenario = scenario_of(base_text +
                                        "[[sweep]]\nkey = 'chain.stations'\nvalues = [1, 2]\n"
                                        "[[sweep]]\nkey = 'channel.transmittance'\nfrom = 0\nto = 1\npoints = 4\n");
  ASSERT_EQ(scenario.point_count(), 8u);
  const auto parameters = scenario.parameters_at(6);
  EXPECT_EQ(parameters[0].first, "chain.stations");
  EXPECT_EQ(value_text(parameters[0].second), "2");
  EXPECT_EQ(value_text(parameters[1].second), "2/3");
  EXPECT_EQ(chain_at(scenario, 6)->station_count(), 2u);
  EXPECT_EQ(chain_at(scenario, 6)->left_arms[0].transmittance, Real(exact("2/3")));
  EXPECT_EQ(chain_at(scenario, 3)->station_count(), 1u);
}

TEST(Sweeps, ASweptAddressBeatsItsOverrideAndStandsForAMissingKey) {
  const std::string text = sources_and_detectors +
                           "[override]\nstation.2.indistinguishability = 0.5\n"
                           "[[sweep]]\nkey = 'station.2.indistinguishability'\nvalues = [0.25]\n"
                           "[[sweep]]\nkey = 'channel.transmittance'\nvalues = [0.75]\n";
  EXPECT_EQ(chain_of(text).stations[1].indistinguishability, Real(exact("0.25")));
  EXPECT_EQ(chain_of(text).left_arms[0].transmittance, Real(exact("0.75")));
}

TEST(Sweeps, WordsCanBeSwept) {
  const std::string text =
      base_text + "[[sweep]]\nkey = 'station.detector.dark_model'\nvalues = ['independent', 'thermal']\n";
  EXPECT_EQ(chain_of(text, {}, 1).stations[0].detectors[cH].dark_model, DarkModel::thermal);
}

TEST(Sweeps, AFewLogarithmicPointsAreKnown) {
  const auto value = [](const std::string& from, const std::string& to, std::uint64_t points, std::uint64_t index) {
    Sweep sweep;
    sweep.spacing = Sweep::Spacing::logarithmic;
    sweep.from = exact(from);
    sweep.to = exact(to);
    sweep.points = points;
    return std::get<Rational>(sweep.value(index));
  };
  EXPECT_EQ(value("1e-6", "1", 7, 1), Rational(1e-5));
  EXPECT_EQ(value("1e-6", "1", 7, 6), 1);
  EXPECT_EQ(value("1", "1024", 11, 5), 32);
  EXPECT_EQ(value("2", "1", 3, 1), Rational(std::sqrt(2.0)));
  // Half way between two doubles, whose significands end in an even and in an odd bit.
  EXPECT_EQ(value("1", "81129638414606699710187514626049", 3, 1), Rational(0x1p53));
  EXPECT_EQ(value("1", "81129638414606735738984533590025", 3, 1), Rational(0x1p53 + 4));
}

// x is the double nearest to g where (x - u/2)^s <= g^s <= (x + u/2)^s, all in exact rationals.
TEST(Sweeps, LogarithmicPointsAreTheNearestDoubles) {
  test::for_each_case(300, 3, [](test::Random& random) {
    Sweep sweep;
    sweep.spacing = Sweep::Spacing::logarithmic;
    sweep.from = Rational(1 + random() % 1000, 1 + random());
    sweep.to = Rational(1 + random() % 1000, 1 + random() % 100000);
    sweep.from.canonicalize();
    sweep.to.canonicalize();
    sweep.points = 3 + random() % 12;
    const std::uint64_t index = random() % sweep.points;
    const auto power = [](const Rational& x, std::uint64_t n) {
      Rational result = 1;
      for (std::uint64_t k = 0; k < n; ++k) result *= x;
      return result;
    };
    const std::uint64_t steps = sweep.points - 1;
    const Rational exact_power = power(sweep.from, steps - index) * power(sweep.to, index);
    const double x = std::get<Rational>(sweep.value(index)).get_d();
    ASSERT_EQ(Rational(x), std::get<Rational>(sweep.value(index)));
    const Rational low = (Rational(x) + Rational(std::nextafter(x, 0))) / 2;
    const Rational high = (Rational(x) + Rational(std::nextafter(x, INFINITY))) / 2;
    EXPECT_LE(power(low, steps), exact_power);
    EXPECT_GE(power(high, steps), exact_power);
  });
}

TEST(ChainWith, ChangesSettingsAndChecksThem) {
  const Scenario scenario = scenario_of(base_text + "[[sweep]]\nkey = 'end.detector.efficiency'\nvalues = [0.5]\n");
  const auto chain =
      chain_with(scenario, {{"channel.transmittance", exact("0.3")}, {"station.1.herald", std::string("psi-")}});
  ASSERT_TRUE(chain);
  EXPECT_EQ(chain->left_arms[0].transmittance, Real(exact("0.3")));
  EXPECT_EQ(chain->stations[0].herald, Herald::psi_minus);
  EXPECT_EQ(chain->left_end.detectors[plus].efficiency, Real(exact("0.25")));
  EXPECT_FALSE(chain_with(scenario, {{"channel.transmittance", exact("1.3")}}));
  EXPECT_FALSE(chain_with(scenario, {{"channel.length_km", exact("3")}}));
  EXPECT_FALSE(chain_with(scenario, {{"channel.transmitance", exact("0.3")}}));
  EXPECT_FALSE(chain_with(scenario, {{"station.4.indistinguishability", exact("0.3")}}));
}

TEST(Patterns, AreReadInBothForms) {
  const Pattern parts =
      *scenario_of(base_text + "ask.pattern = { stations = ['1100', ['*', '0', '1', '*'], '****'], left = '10' }")
           .pattern;
  using enum Ask::Kind;
  EXPECT_EQ(parts.stations[0], (std::array<Ask, 4>{Ask{clicks}, Ask{clicks}, Ask{silent}, Ask{silent}}));
  EXPECT_EQ(parts.stations[1], (std::array<Ask, 4>{Ask{not_looked_at}, Ask{silent}, Ask{clicks}, Ask{not_looked_at}}));
  EXPECT_EQ(parts.left, (std::array<Ask, 2>{Ask{clicks}, Ask{silent}}));
  EXPECT_EQ(parts.right, (std::array<Ask, 2>{}));
  const Pattern whole = *scenario_of(
                             "chain.stations = 0\nsource.pair_parameter = 0\nchannel.transmittance = 1\n"
                             "end.detector = { efficiency = 1, kind = 'resolving' }\n"
                             "ask.pattern = ['1', 'n0', '*', 'n2']")
                             .pattern;
  EXPECT_EQ(whole.left, (std::array<Ask, 2>{Ask{clicks}, Ask{counts, 0}}));
  EXPECT_EQ(whole.right, (std::array<Ask, 2>{Ask{not_looked_at}, Ask{counts, 2}}));
  EXPECT_EQ(scenario_of(base_text + "ask.pattern = {}").pattern->stations.size(), 3u);
}

TEST(Scenario, TenThousandStationsResolve) {
  const Chain chain = chain_of(base_text, {{"chain.stations", "10000"}});
  EXPECT_EQ(chain.stations.size(), 10000u);
  EXPECT_EQ(chain.stations.back().detectors[dV].efficiency, Real(exact("0.5")));
}

TEST(Scenario, EveryValueFaultIsToldInTheOrderOfTheText) {
  const auto scenario = read_scenario(
      "chain.stations = 2\nsource.pair_parameter = 1\nfoo = 3\n[end.detector]\nefficiency = 'x'\n", "x.toml");
  ASSERT_FALSE(scenario);
  std::vector<std::string> lines;
  for (const Fault& fault : scenario.faults()) lines.push_back(describe(fault).substr(0, 41));
  ASSERT_EQ(lines.size(), 5u);
  EXPECT_EQ(lines[0], "x.toml:2:25: source.pair_parameter: is 1;");
  EXPECT_EQ(lines[1], "x.toml:3:1: foo: is an unknown key; allow");
  EXPECT_EQ(lines[2], "x.toml:5:14: end.detector.efficiency: 'x'");
  EXPECT_EQ(lines[3], "x.toml: channel.transmittance: is missing");
  EXPECT_EQ(lines[4], "x.toml: station.detector.efficiency: is m");
}

}  // namespace
}  // namespace heraldgauge::model
