#include "bench/chains.hpp"

#include <algorithm>
#include <fstream>
#include <sstream>
#include <stdexcept>

namespace heraldgauge::bench {
namespace {

template <class T>
const T& value_or_throw(const model::Expected<T>& expected) {
  if (!expected) throw std::runtime_error(model::describe(expected.faults().front()));
  return *expected;
}

double number(const model::Real& x) {
  if (!x.is_rational()) throw std::runtime_error(x.text() + " is irrational");
  return x.rational().get_d();
}

template <class T>
bool all_equal(const std::vector<T>& places) {
  return std::adjacent_find(places.begin(), places.end(), std::not_equal_to<>()) == places.end();
}

bool is_alike(const model::Chain& chain) {
  const model::Detector& detector = chain.left_end.detectors.front();
  model::Station station;
  station.detectors.fill(detector);
  const auto ends_alike = [&](const model::End& end) {
    return end.detectors.front() == detector && end.detectors.back() == detector && end.background.photons.is_zero();
  };
  return all_equal(chain.sources) && all_equal(chain.left_arms) && chain.right_arms == chain.left_arms &&
         std::all_of(chain.stations.begin(), chain.stations.end(), [&](const auto& s) { return s == station; }) &&
         ends_alike(chain.left_end) && ends_alike(chain.right_end) &&
         chain.sources.front().kind == model::SourceKind::squeezed &&
         detector.dark_model == model::DarkModel::independent && detector.kind == model::DetectorKind::threshold;
}

}  // namespace

model::Chain chain_of(const std::string& name, const std::vector<model::Assignment>& changes) {
  const std::string path = std::string(HERALDGAUGE_BENCH_CHAINS) + "/" + name + ".toml";
  std::ifstream file(path);
  if (!file) throw std::runtime_error("cannot read " + path);
  std::ostringstream text;
  text << file.rdbuf();
  return value_or_throw(model::chain_at(value_or_throw(model::read_scenario(text.str(), path, changes)), 0));
}

AlikeChain alike(const model::Chain& chain) {
  if (!is_alike(chain)) throw std::runtime_error("the baselines need a chain in which everything is alike");
  const model::Detector& detector = chain.left_end.detectors.front();
  return {static_cast<int>(chain.station_count()), number(chain.sources.front().pair_parameter),
          number(chain.left_arms.front().transmittance), number(detector.efficiency),
          number(detector.dark_probability)};
}

}  // namespace heraldgauge::bench
