#pragma once
// A small valid scenario to vary in tests.

#include <gtest/gtest.h>

#include <string>

#include "reference/model/scenario.hpp"

namespace heraldgauge::model {

inline const std::string sources_and_detectors =
    "chain.stations = 3\nsource.pair_parameter = 0.01\nstation.detector.efficiency = 0.5\nend.detector.efficiency = "
    "0.25\n";
inline const std::string base_text = sources_and_detectors + "channel.transmittance = 0.1\n";

inline std::string first_fault(const std::string& text, const std::vector<Assignment>& assignments = {}) {
  const Expected<Scenario> scenario = read_scenario(text, "x.toml", assignments);
  return scenario ? "no fault" : describe(scenario.faults().front());
}

inline Scenario scenario_of(const std::string& text, const std::vector<Assignment>& assignments = {}) {
  Expected<Scenario> scenario = read_scenario(text, "x.toml", assignments);
  if (scenario) return *scenario;
  ADD_FAILURE() << text << "\n" << describe(scenario.faults().front());
  return {};
}

inline Chain chain_of(const std::string& text, const std::vector<Assignment>& assignments = {},
                      std::uint64_t index = 0) {
  const Expected<Chain> chain = chain_at(scenario_of(text, assignments), index);
  if (chain) return *chain;
  ADD_FAILURE() << text << "\n" << describe(chain.faults().front());
  return {};
}

inline Rational exact(const std::string& text) { return *parse_exact(text); }

}  // namespace heraldgauge::model
