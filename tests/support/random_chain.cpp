#include "tests/support/random_chain.hpp"

#include <array>

#include <cmath>

namespace heraldgauge::test {
namespace {

using model::Chain;
using model::Detector;
using model::Rational;
using model::Real;

// Draws each kind of parameter anew, or repeats the first draw where the recipe says that all are alike.
class Drawer {
 public:
  Drawer(Random& random, const ChainRecipe& recipe) : random_(random), recipe_(recipe) {
    lam_ = draw_lam();
    transmittance_ = draw_transmission();
    detector_ = draw_detector();
    indistinguishability_ = draw_indistinguishability();
  }

  Real lam() { return recipe_.all_alike ? lam_ : draw_lam(); }
  Real transmittance() { return recipe_.all_alike ? transmittance_ : draw_transmission(); }
  Detector detector() { return recipe_.all_alike ? detector_ : draw_detector(); }
  Real indistinguishability() { return recipe_.all_alike ? indistinguishability_ : draw_indistinguishability(); }

  model::Herald herald() {
    if (!recipe_.mixed_heralds) return model::Herald::psi_plus;
    return static_cast<model::Herald>(random_() % 3);
  }

  Rational angle() {
    return recipe_.free_angles ? Rational(std::round(uniform(random_, -180, 180) * 64) / 64) : Rational(0);
  }

 private:
  Real draw_lam() { return Rational(log_uniform(random_, recipe_.smallest_lam, recipe_.largest_lam)); }
  Real draw_transmission() {
    return Rational(log_uniform(random_, recipe_.smallest_transmission, recipe_.largest_transmission));
  }
  Real draw_indistinguishability() {
    switch (random_() % 4) {
      case 0:
        return Real(1);
      case 1:
        return Real(0);
      default:
        return Rational(uniform(random_, 0, 1));
    }
  }
  Detector draw_detector() {
    Detector detector;
    detector.efficiency = draw_transmission();
    const bool noiseless = random_() % 4 == 0;
    const double dark = log_uniform(random_, recipe_.smallest_dark, recipe_.largest_dark);
    detector.dark_probability = noiseless ? Rational(0) : Rational(dark);
    const bool thermal = random_() % 2 == 0;
    if (recipe_.thermal_allowed && thermal) detector.dark_model = model::DarkModel::thermal;
    return detector;
  }

  Random& random_;
  const ChainRecipe& recipe_;
  Real lam_, transmittance_, indistinguishability_;
  Detector detector_;
};

std::string text_of(const Detector& detector) {
  return "{eta " + detector.efficiency.text() + " d " + detector.dark_probability.text() +
         (detector.dark_model == model::DarkModel::thermal ? " thermal}" : "}");
}

model::Ask random_ask(Random& random) {
  using Kind = model::Ask::Kind;
  constexpr std::array<Kind, 4> kinds{Kind::clicks, Kind::clicks, Kind::silent, Kind::not_looked_at};
  return {kinds[random() % kinds.size()]};
}

}  // namespace

double uniform(Random& random, double from, double to) {
  return from + (to - from) * (static_cast<double>(random() >> 11) * 0x1p-53);
}

double log_uniform(Random& random, double from, double to) {
  return std::exp(uniform(random, std::log(from), std::log(to)));
}

Chain random_chain(Random& random, const ChainRecipe& recipe) {
  Chain chain;
  const auto spread = static_cast<std::uint64_t>(recipe.largest_station_count - recipe.smallest_station_count + 1);
  const std::size_t stations = static_cast<std::size_t>(recipe.smallest_station_count) + random() % spread;
  Drawer draw(random, recipe);
  for (std::size_t k = 0; k <= stations; ++k) {
    chain.sources.push_back({model::SourceKind::squeezed, draw.lam()});
    chain.left_arms.push_back({draw.transmittance()});
    chain.right_arms.push_back({draw.transmittance()});
  }
  for (std::size_t k = 0; k < stations; ++k) {
    model::Station station;
    station.herald = draw.herald();
    station.indistinguishability = draw.indistinguishability();
    for (Detector& detector : station.detectors) detector = draw.detector();
    chain.stations.push_back(station);
  }
  for (model::End* end : {&chain.left_end, &chain.right_end}) {
    for (Detector& detector : end->detectors) detector = draw.detector();
    end->analyser_deg = draw.angle();
  }
  return chain;
}

Chain alike_chain(std::size_t stations, const std::string& lam, const std::string& transmittance,
                  const std::string& efficiency, const std::string& dark) {
  const auto exact = [](const std::string& fraction) {
    Rational value(fraction);
    value.canonicalize();
    return Real(value);
  };
  const Detector detector{exact(efficiency), exact(dark)};
  model::Station station;
  station.detectors.fill(detector);
  model::End end;
  end.detectors.fill(detector);
  Chain chain;
  chain.sources.assign(stations + 1, {model::SourceKind::squeezed, exact(lam)});
  chain.left_arms.assign(stations + 1, {exact(transmittance)});
  chain.right_arms = chain.left_arms;
  chain.stations.assign(stations, station);
  chain.left_end = chain.right_end = end;
  return chain;
}

std::string describe_chain(const Chain& chain) {
  std::string text = "N " + std::to_string(chain.station_count());
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    text += "; source " + chain.sources[k].pair_parameter.text() + " arms " + chain.left_arms[k].transmittance.text() +
            ", " + chain.right_arms[k].transmittance.text();
    if (k == chain.stations.size()) break;
    const model::Station& station = chain.stations[k];
    text += "; station herald " + std::to_string(static_cast<int>(station.herald)) + " v " +
            station.indistinguishability.text();
    for (const Detector& detector : station.detectors) text += " " + text_of(detector);
  }
  for (const model::End* end : {&chain.left_end, &chain.right_end}) {
    text += "; end at " + end->analyser_deg.get_str();
    for (const Detector& detector : end->detectors) text += " " + text_of(detector);
  }
  return text;
}

model::Pattern random_pattern(Random& random, std::size_t stations) {
  model::Pattern pattern;
  for (std::size_t k = 0; k < stations; ++k) {
    pattern.stations.push_back({random_ask(random), random_ask(random), random_ask(random), random_ask(random)});
  }
  for (auto* end : {&pattern.left, &pattern.right}) *end = {random_ask(random), random_ask(random)};
  return pattern;
}

}  // namespace heraldgauge::test
