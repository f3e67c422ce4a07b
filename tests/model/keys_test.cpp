#include <gtest/gtest.h>

#include <set>

#include "tests/model/scenario_support.hpp"

namespace heraldgauge::model {
namespace {

struct Range {
  std::string key;
  std::vector<std::string> inside, outside;
};

class Ranges : public testing::TestWithParam<Range> {};

// Each value is set over a scenario in which the key may stand.
TEST_P(Ranges, HoldAtBothEnds) {
  const auto text_for = [](const std::string& key) {
    if (key == "channel.length_km") return sources_and_detectors + "channel.attenuation_db_per_km = 0.2\n";
    if (key.starts_with("channel.") && key != "channel.transmittance")
      return sources_and_detectors + "channel.length_km = 1\nchannel.attenuation_db_per_km = 0.2\n";
    if (key == "source.mean_pairs" || key == "source.squeezing") {
      return std::string(
          "chain.stations = 3\nstation.detector.efficiency = 1\nend.detector.efficiency = 1\nchannel.transmittance = "
          "1\n");
    }
    if (key == "source.pair_probability") {
      return std::string(
          "chain.stations = 3\nsource.kind = 'ideal-pair'\nstation.detector.efficiency = 1\nend.detector.efficiency = "
          "1\nchannel.transmittance = 1\n");
    }
    if (key.ends_with("dark_scale")) return base_text + key.substr(0, key.size() - 5) + "slope = 0\n";
    return base_text;
  };
  const std::string& key = GetParam().key;
  for (const std::string& value : GetParam().inside) {
    EXPECT_EQ(first_fault(text_for(key), {{key, value}}), "no fault") << key << " = " << value;
  }
  for (const std::string& value : GetParam().outside) {
    const std::string fault = first_fault(text_for(key), {{key, value}});
    EXPECT_EQ(fault.find("--set: " + key + ": "), 0u) << fault << " at " << value;
    EXPECT_NE(fault.find("; allowed: "), std::string::npos) << fault;
  }
}

const std::vector<std::string> to_one = {"0", "1", "'1/3'", "1e-300"},
                               not_to_one = {"-1e-30", "'1.0000000000000000000000000001'", "2", "nan", "true", "[0.5]",
                                             "x"};
const std::vector<std::string> below_one = {"0", "0.5", "'0.99999999999999999999999999'"},
                               not_below_one = {"1", "-0.1", "inf"};
const std::vector<std::string> positive = {"0", "1e-30", "'1e100'"}, not_positive = {"-1e-30", "''", "0x10"};

INSTANTIATE_TEST_SUITE_P(
    All, Ranges,
    testing::Values(
        Range{"chain.stations", {"3", "10000", "3.0", "'6/2'"}, {"-1", "10001", "1.5"}},
        Range{"chain.herald", {"psi+", "psi-", "either"}, {"phi+", "3", "[\"psi+\"]", "[1, 2, 3]"}},
        Range{"inputs", {"decimal", "binary64"}, {"double", "64"}},
        Range{"source.pair_parameter", below_one, not_below_one},
        Range{"source.2.pair_parameter", below_one, not_below_one}, Range{"source.squeezing", positive, not_positive},
        Range{"source.mean_pairs", positive, not_positive}, Range{"source.pair_probability", to_one, not_to_one},
        Range{"channel.transmittance", to_one, not_to_one}, Range{"arm.0.left.transmittance", to_one, not_to_one},
        Range{"arm.3.right.transmittance", to_one, not_to_one}, Range{"arm.4.right.transmittance", {}, {"0.5"}},
        Range{"channel.length_km", positive, not_positive},
        Range{"channel.attenuation_db_per_km", positive, not_positive},
        Range{"channel.insertion_loss_db", positive, not_positive},
        Range{"station.indistinguishability", to_one, not_to_one},
        Range{"station.1.indistinguishability", to_one, not_to_one},
        Range{"station.0.indistinguishability", {}, {"0.5"}}, Range{"station.3.herald", {"psi-"}, {"psi"}},
        Range{"station.detector.efficiency", to_one, not_to_one}, Range{"end.detector.efficiency", to_one, not_to_one},
        Range{"station.3.detector.dV.efficiency", to_one, not_to_one},
        Range{"end.right.detector.cross.efficiency", to_one, not_to_one},
        Range{"station.detector.dark_probability", below_one, not_below_one},
        Range{"end.detector.dark_probability", below_one, not_below_one},
        Range{"end.detector.dark_model", {"independent", "thermal"}, {"poisson"}},
        Range{"station.detector.kind", {"threshold", "resolving"}, {"squeezed"}},
        Range{"end.detector.dark_scale", {"0", "0.999"}, {"-1", "1"}},
        Range{"end.background_photons", positive, not_positive},
        Range{"station.background_modes", {"1", "1000000000"}, {"0", "1.5", "1000000001"}},
        Range{"analyser.left_deg", {"-720", "22.5"}, {"nan"}}, Range{"analyser.right_deg", {"-720", "22.5"}, {"east"}},
        Range{"protocol.sifting", {"1", "1e-30"}, {"0", "1.1"}},
        Range{"protocol.error_correction_factor", {"1", "2"}, {"0.999", "inf"}}));

TEST(Keys, AreListedOnceWithAllTheirParts) {
  std::set<std::string> names;
  for (const KeyEntry& entry : key_registry()) {
    EXPECT_TRUE(names.insert(entry.key).second) << entry.key;
    EXPECT_FALSE(entry.allowed.empty()) << entry.key;
    EXPECT_TRUE(entry.sentence.ends_with(".")) << entry.key;
  }
  for (const char* key :
       {"title", "inputs", "chain.stations", "source.K.pair_parameter", "arm.K.left.transmittance", "ask.pattern",
        "station.K.detector.cH.efficiency", "end.left.detector.plus.dark_scale", "end.right.background_modes"}) {
    EXPECT_EQ(names.count(key), 1u) << key;
  }
  for (const char* key : {"link.kind", "arm.K.left.rotation_deg", "arm.K.left.depolarising"})
    EXPECT_EQ(names.count(key), 0u) << key;
}

}  // namespace
}  // namespace heraldgauge::model
