// Each convention on a chain where its effect is known by hand.

#include "compare/binary64.hpp"
#include "reference/model/scenario.hpp"
#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;
using model::Real;

Case perfect(const std::string& lam = "1/5") { return case_of(test::alike_chain(0, lam, "1/1", "1/1", "0/1")); }

model::Chain transformed(const std::string& id, const Case& point) {
  const auto other = departure_named(id).transform(point);
  if (!other) throw std::runtime_error("refused");
  return other->chain;
}

Real pair_parameter_by(const std::string& id, const std::string& lam) {
  return transformed(id, perfect(lam)).sources[0].pair_parameter;
}

// lam = 1/10 used as mu is lam 1/11; lam = 1/11 is mu 1/10, half of which is lam 1/21 and twice lam 1/6.
TEST(PairParameter, IsReadAsAnotherNumber) {
  EXPECT_EQ(pair_parameter_by("mean-pairs-as-parameter", "1/10"), Real(Rational(1, 11)));
  EXPECT_EQ(pair_parameter_by("mean-pairs-per-pulse", "1/11"), Real(Rational(1, 21)));
  EXPECT_EQ(pair_parameter_by("mean-pairs-doubled", "1/11"), Real(Rational(1, 6)));
  // One perfect source: gain 1 - (1-lam)^2 with lam = tanh(1/5)^2.
  const double lam = std::pow(std::tanh(0.2), 2);
  expect_near(enclosure_by("squeezing-as-parameter", perfect(), "gain"), 1 - (1 - lam) * (1 - lam), 1e-13);
  expect_encloses(enclosure_by("mean-pairs-as-parameter", perfect("1/10"), "gain"), 1 - Rational(100, 121));
}

TEST(AmplitudeTransmittance, TakesTheRoot) {
  const Case quarter = case_of(test::alike_chain(0, "1/5", "1/4", "1/1", "0/1"));
  EXPECT_EQ(transformed("amplitude-transmittance", quarter).left_arms[0].transmittance, Real(Rational(1, 2)));
  expect_near(enclosure_by("amplitude-transmittance", quarter, "capacity_point"), -std::log2(0.75), 1e-14);
  EXPECT_EQ(error_of("amplitude-transmittance", quarter, "gain").bias, Bias::optimistic);
}

model::Scenario fibre() {
  const auto scenario = model::read_scenario(R"(
[chain]
stations = 1
[source]
pair_parameter = 0.1
[channel]
length_km = 40
attenuation_db_per_km = 0.5
insertion_loss_db = 10
[station.detector]
efficiency = 1
[end.detector]
efficiency = 1
[override]
"arm.1.right.transmittance" = 0.5
)",
                                             "fibre.toml");
  if (!scenario) throw std::runtime_error(model::describe(scenario.faults().front()));
  return *scenario;
}

double transmittance_of(const model::Chain& chain, bool overridden) {
  return to_binary64((overridden ? chain.right_arms[1] : chain.left_arms[0]).transmittance);
}

// 40 km over four arms: 10 km of 0.5 dB/km and 10 dB, so 10^-1.5; the overridden arm stays.
TEST(ChannelLength, IsReadAsAnotherNumber) {
  const model::Scenario scenario = fibre();
  const Case point = *case_at(scenario, 0);
  EXPECT_NEAR(transmittance_of(point.chain, false), std::pow(10, -1.5), 1e-14);
  EXPECT_NEAR(transmittance_of(transformed("whole-length-per-arm", point), false), std::pow(10, -3), 1e-14);
  EXPECT_NEAR(transmittance_of(transformed("neper-attenuation", point), false), 0.1 * std::exp(-5), 1e-14);
  for (const char* id : {"whole-length-per-arm", "neper-attenuation"}) {
    EXPECT_EQ(transmittance_of(transformed(id, point), true), 0.5);
  }
}

TEST(ChannelLength, IsDeclinedWhereThereIsNone) {
  for (const char* id : {"whole-length-per-arm", "neper-attenuation"}) {
    const auto values = departure_named(id).enclose(perfect(), {quantity_named("gain")}, {}, 10);
    EXPECT_EQ(values.front().status, fast::Status::declined);
    EXPECT_FALSE(values.front().reason.empty());
  }
}

// lam = 0: an end clicks with 1 - (1-d)^2 at each; 1 - sqrt(1 - 19/100) = 1/10.
TEST(DarkPerPair, SharesTheDarkProbability) {
  const Case dark = case_of(test::alike_chain(0, "0/1", "1/1", "1/1", "19/100"));
  expect_encloses(enclosure_by("dark-per-pair", dark, "gain"), Rational(19 * 19) / 10000);
}

// P(1010) of one H pair at efficiency eta both sides, first order: with lam -> the model at eta^2.
TEST(EfficiencyTwice, SquaresTheEfficiency) {
  const Case half = case_of(test::alike_chain(0, "1/5", "1/1", "1/2", "0/1"));
  const Case quarter = case_of(test::alike_chain(0, "1/5", "1/1", "1/4", "0/1"));
  EXPECT_EQ(transformed("efficiency-twice", half), quarter.chain);
  EXPECT_EQ(error_of("efficiency-twice", half, "gain").bias, Bias::pessimistic);
}

TEST(AnalyserAngle, IsDoubledOrHalved) {
  Case turned = perfect();
  turned.chain.left_end.analyser_deg = Rational(45, 2);
  EXPECT_EQ(transformed("analyser-angle-doubled", turned).left_end.analyser_deg, 45);
  EXPECT_EQ(transformed("analyser-angle-halved", turned).left_end.analyser_deg, Rational(45, 4));
  // At zero degrees nothing changes.
  EXPECT_EQ(error_of("analyser-angle-doubled", perfect(), "end_pattern_1010").bias, Bias::exact);
}

// Key without errors: gain * sifting, so leaving out sifting 1/2 doubles it and f does not matter.
TEST(Protocol, SiftingLeftOutDoublesTheKey) {
  const Case weak = case_of(test::alike_chain(0, "1/100", "1/1", "1/2", "0/1"));
  const auto error = error_of("sifting-left-out", weak, "key_fraction");
  ASSERT_TRUE(error.certified);
  expect_encloses(*error.certified, 1);
  EXPECT_EQ(error.bias, Bias::optimistic);
}

TEST(Protocol, IdealErrorCorrectionSavesTheExcess) {
  const Case weak = case_of(test::alike_chain(0, "1/50", "1/1", "1/2", "1/1000"));
  const auto key = enclosure_by("ideal-error-correction", weak, "key_fraction");
  const auto exact = error_of("ideal-error-correction", weak, "key_fraction");
  const auto rate = error_of("sifting-left-out", weak, "qber_rectilinear").exact->lower.get_d();
  const double gain = error_of("sifting-left-out", weak, "gain").exact->lower.get_d();
  const double entropy = -rate * std::log2(rate) - (1 - rate) * std::log2(1 - rate);
  EXPECT_NEAR(key.lower.get_d() - exact.exact->lower.get_d(), gain * 0.5 * 0.16 * entropy, 1e-12);
}

TEST(PerHeraldAsPerTrial, DividesByTheHerald) {
  const Case one = case_of(test::alike_chain(1, "1/1000", "1/2", "1/2", "0/1"));
  const auto herald = error_of("sifting-left-out", one, "herald_probability").exact->lower.get_d();
  const auto error = error_of("per-herald-as-per-trial", one, "key_rate");
  EXPECT_NEAR(error.relative->get_d(), 1 / herald - 1, 1e-6 / herald);
}

TEST(NaturalLogarithm, MultipliesByLnTwo) {
  const Case half = case_of(test::alike_chain(0, "1/5", "1/2", "1/1", "0/1"));
  expect_near(enclosure_by("natural-logarithm", half, "capacity_point"), -std::log(0.75), 1e-14);
  EXPECT_NEAR(error_of("natural-logarithm", half, "capacity_arm").relative->get_d(), std::log(2) - 1, 1e-12);
  const Case weak = case_of(test::alike_chain(0, "1/50", "1/1", "1/2", "1/1000"));
  EXPECT_EQ(error_of("natural-logarithm", weak, "key_fraction").bias, Bias::optimistic);
}

// Perfect detectors: h photons of H with lam^h (1-lam); events with photons of one polarisation only, 2 lam (1-lam), of
// which none is wrong. In the model both-both events, lam^2, are wrong half of the time.
TEST(DoubleClicksDropped, LeavesSingleClicks) {
  const Rational lam(1, 5);
  expect_encloses(enclosure_by("double-clicks-dropped", perfect(), "gain"), 2 * lam * (1 - lam));
  EXPECT_EQ(enclosure_by("double-clicks-dropped", perfect(), "qber_rectilinear").upper, 0);
  EXPECT_EQ(enclosure_by("double-clicks-dropped", perfect(), "end_pattern_1111").upper, 0);
  const auto exact = *error_of("double-clicks-dropped", perfect(), "qber_rectilinear").exact;
  expect_encloses(exact, lam * lam / 2 / (1 - (1 - lam) * (1 - lam)));
}

}  // namespace
}  // namespace heraldgauge::compare
