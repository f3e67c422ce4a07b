#pragma once
// A link to evaluate: a chain of one station read from a scenario.

#include <reference/model/scenario.hpp>

inline heraldgauge::model::Chain link() {
  const auto scenario = heraldgauge::model::read_scenario(
      "chain.stations = 1\n"
      "source.pair_parameter = 0.05\n"
      "channel.transmittance = 0.5\n"
      "station.detector.efficiency = 0.5\n"
      "end.detector.efficiency = 0.5\n",
      "link");
  return heraldgauge::model::chain_at(scenario.value(), 0).value();
}
