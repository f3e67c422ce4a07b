// The fast evaluator against published closed forms and printed numbers (tests/published/published.json names the
// source of each), no other evaluator in between.

#include <gtest/gtest.h>

#include "fast/evaluate.hpp"
#include "tests/support/published.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

using fast::Status;
using model::Chain;
using model::Quantity;
using model::QuantityKind;
using model::Rational;
using model::Real;

Rational number(const Texts& texts, const std::string& name) { return exact_decimal(texts.at(name)); }
bool has(const Texts& texts, const std::string& name) { return texts.count(name) > 0; }

double value_of(const Chain& chain, const Quantity& quantity) {
  const fast::Value value = fast::evaluate(chain, {quantity}).front();
  EXPECT_EQ(value.status, Status::computed) << value.reason;
  return fast::to_binary64(value.value);
}

void expect_close(double value, const Texts& published, const std::string& name) {
  const double printed = number(published, name).get_d();
  EXPECT_LE(std::abs(value - printed), 1e-12 * printed) << name << " " << value << " against " << printed;
}

// A source of mu pairs a polarisation between perfect arms.
Chain direct_link(const Texts& parameters) {
  Chain chain = alike_chain(0, "1/2", "1", "1", "0");
  const Rational mu = number(parameters, "lambda");
  chain.sources[0].pair_parameter = Real(Rational(mu / (1 + mu)));
  return chain;
}

// Ma, Fung and Lo (2007), the error gain with the factor (1-d_A)(1-d_B) of the detector model; misalignment enters as a
// bit flip.
TEST(FastPublished, GainAndErrorOfOneSource) {
  int checked = 0;
  for (const PublishedCase& one : published_entry("MFL-gain-qber").cases) {
    Chain chain = direct_link(one.parameters);
    const auto detector = [&](const std::string& side) {
      const Real efficiency(number(one.parameters, "eta_" + side));
      if (has(one.parameters, "d_per_detector")) {
        return model::Detector{efficiency, Real(number(one.parameters, "d_per_detector"))};
      }
      const Real quiet = Real::square_root(Real(Rational(1 - number(one.parameters, "Y0_" + side))));
      return model::Detector{efficiency, Real(1) - quiet};
    };
    chain.left_end.detectors.fill(detector("A"));
    chain.right_end.detectors.fill(detector("B"));
    expect_close(value_of(chain, {QuantityKind::gain}), one.values, "Q");
    const double flipped = number(one.parameters, "e_d").get_d();
    for (const QuantityKind kind : {QuantityKind::qber_rectilinear, QuantityKind::qber_diagonal}) {
      const double aligned = value_of(chain, {kind});
      expect_close(flipped + (1 - 2 * flipped) * aligned, one.values, "E_exact_detector_model");
    }
    ++checked;
  }
  EXPECT_EQ(checked, 6);
}

// One detector looked at on each side, analysers aligned and crossed.
TEST(FastPublished, CoincidencesOfOneSource) {
  int checked = 0;
  for (const PublishedCase& one : published_entry("epr-visibility").cases) {
    if (has(one.parameters, "limit")) continue;
    Chain chain = direct_link(one.parameters);
    const Real dark(number(one.parameters, "d"));
    chain.left_end.detectors.fill({Real(number(one.parameters, "eta_A")), dark});
    chain.right_end.detectors.fill({Real(number(one.parameters, "eta_B")), dark});
    const auto coincidence = [&] {
      double sum = 0;
      for (const int outcome : {0b1010, 0b1011, 0b1110, 0b1111}) {
        sum += value_of(chain, {QuantityKind::end_pattern, outcome});
      }
      return sum;
    };
    expect_close(coincidence(), one.values, "P_max");
    chain.right_end.analyser_deg = 90;
    expect_close(coincidence(), one.values, "P_min");
    ++checked;
  }
  EXPECT_EQ(checked, 4);
}

Chain swap(const Texts& parameters) {
  Chain chain = alike_chain(1, "1/2", "1", "1", "0");
  const Rational mu = number(parameters, "lambda");
  for (model::Source& source : chain.sources) source.pair_parameter = Real(Rational(mu / (1 + mu)));
  model::Detector detector{Real(number(parameters, "eta_centre")), Real(number(parameters, "d"))};
  if (parameters.at("detector_model") == "thermal") detector.dark_model = model::DarkModel::thermal;
  chain.stations[0].detectors.fill(detector);
  detector.efficiency = Real(number(parameters, "eta_outer"));
  for (model::End* end : {&chain.left_end, &chain.right_end}) end->detectors.fill(detector);
  chain.left_end.analyser_deg = parameters.at("basis") == "HV" ? 0 : 45;
  return chain;
}

// All four outer detectors read, the right analyser free: at these symmetric chains its extremes are the published
// ones.
TEST(FastPublished, VisibilityOfOneSwap) {
  int checked = 0;
  for (const PublishedCase& one : published_entry("swap-visibility").cases) {
    if (!has(one.values, "V_exclusive_four_detectors")) continue;
    expect_close(value_of(swap(one.parameters), {QuantityKind::visibility}), one.values, "V_exclusive_four_detectors");
    ++checked;
  }
  EXPECT_EQ(checked, 10);
}

TEST(FastPublished, HeraldOfOneSwap) {
  int checked = 0;
  for (const PublishedCase& one : published_entry("swap-visibility").cases) {
    if (!has(one.values, "P_BSM_one_pattern")) continue;
    expect_close(value_of(swap(one.parameters), {QuantityKind::herald_probability}) / 2, one.values,
                 "P_BSM_one_pattern");
    ++checked;
  }
  EXPECT_EQ(checked, 4);
}

// Pirandola (2019) for chains of equal pieces, and the two bounds of one lossy channel.
TEST(FastPublished, CapacitiesOfLossyLines) {
  for (const PublishedCase& one : published_entry("bound-chain").cases) {
    const auto stations = std::stoul(one.parameters.at("N_repeaters"));
    Chain chain = alike_chain(stations, "1/2", "1", "1", "0");
    const Rational arm_db = number(one.parameters, "total_loss_dB") / Rational(2 * (stations + 1));
    for (auto* arms : {&chain.left_arms, &chain.right_arms}) {
      for (model::Arm& arm : *arms) arm.transmittance = Real::power_of_ten(Real(Rational(-arm_db / 10)));
    }
    expect_close(value_of(chain, {QuantityKind::capacity_chain}), one.values, "C");
  }
  for (const PublishedCase& one : published_entry("bounds-p2p").cases) {
    if (!has(one.values, "PLOB")) continue;
    Chain chain = alike_chain(0, "1/2", "1", "1", "0");
    chain.left_arms[0].transmittance =
        has(one.parameters, "eta")
            ? Real(number(one.parameters, "eta"))
            : Real::power_of_ten(
                  Real(Rational(-number(one.parameters, "alpha_dB_per_km") * number(one.parameters, "L_km") / 10)));
    expect_close(value_of(chain, {QuantityKind::capacity_point}), one.values, "PLOB");
    expect_close(value_of(chain, {QuantityKind::capacity_loose}), one.values, "TGW");
  }
}

}  // namespace
}  // namespace heraldgauge::test
