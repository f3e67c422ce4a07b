#include "compare/shortcuts/silent_detectors_binary64.hpp"

#include <cmath>
#include <numbers>

#include "compare/binary64.hpp"

namespace heraldgauge::compare {
namespace {

constexpr std::size_t horizontal = 0;
constexpr std::size_t vertical = 1;

bool holds(DetectorSet set, std::size_t detector) { return (set >> detector & 1U) != 0; }

}  // namespace

// The running product W of 2x2 matrices, each new one multiplied from the left, and the product kappa of off-diagonals.
class ChainBinary64::Ring {
 public:
  void pass_source(double lam) {
    multiply(0, lam, 1, 0);
    kappa_ *= std::sqrt(lam);
  }
  void pass_block(const Block& block) {
    multiply(-block.a, 1, block.x * block.x - block.a * block.b, block.b);
    kappa_ *= block.x;
  }
  double determinant() const { return w00_ + w11_ - 2 * kappa_; }

 private:
  void multiply(double t00, double t01, double t10, double t11) {
    const double w00 = t00 * w00_ + t01 * w10_;
    const double w01 = t00 * w01_ + t01 * w11_;
    const double w10 = t10 * w00_ + t11 * w10_;
    const double w11 = t10 * w01_ + t11 * w11_;
    w00_ = w00, w01_ = w01, w10_ = w10, w11_ = w11;
  }

  double w00_ = 1, w01_ = 0, w10_ = 0, w11_ = 1;
  double kappa_ = 1;
};

ChainBinary64::Detector ChainBinary64::in_binary64(const model::Detector& detector) {
  return {to_binary64(detector.registering_probability()), to_binary64(model::Real(1) - detector.dark_probability)};
}

ChainBinary64::Background ChainBinary64::in_binary64(const model::Background& background) {
  return {to_binary64(background.photons), static_cast<double>(background.modes)};
}

ChainBinary64::End ChainBinary64::in_binary64(const model::End& end, const model::Arm& arm) {
  return {to_binary64(arm.transmittance),
          to_binary64(end.analyser_deg) * std::numbers::pi / 180,
          {in_binary64(end.detectors[0]), in_binary64(end.detectors[1])},
          in_binary64(end.background)};
}

ChainBinary64::ChainBinary64(const model::Chain& chain)
    : left_end_(in_binary64(chain.left_end, chain.left_arms.front())),
      right_end_(in_binary64(chain.right_end, chain.right_arms.back())) {
  for (const model::Source& source : chain.sources) pair_parameters_.push_back(to_binary64(source.pair_parameter));
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    const model::Station& station = chain.stations[k];
    stations_.push_back({to_binary64(chain.right_arms[k].transmittance),
                         to_binary64(chain.left_arms[k + 1].transmittance),
                         to_binary64(station.indistinguishability),
                         {in_binary64(station.detectors[0]), in_binary64(station.detectors[1]),
                          in_binary64(station.detectors[2]), in_binary64(station.detectors[3])},
                         in_binary64(station.background)});
  }
}

// No dark event in the silent detectors of a place: prod (1-d) times (1 + b sum eta/(F M))^-M.
template <std::size_t count>
double ChainBinary64::quiet(const std::array<Detector, count>& detectors, const Background& background,
                            DetectorSet silent) {
  double product = 1;
  double registering = 0;
  for (std::size_t j = 0; j < count; ++j) {
    if (!holds(silent, j)) continue;
    product *= detectors[j].quiet;
    registering += detectors[j].registering;
  }
  const double modes = background.modes;
  return product * std::pow(1 + background.photons * registering / (static_cast<double>(count) * modes), -modes);
}

// Entrance R, exit L; the detectors c and d of one polarisation, d with the opposite sign of interference.
ChainBinary64::Block ChainBinary64::polarisation_block(const Station& station, DetectorSet silent,
                                                       std::size_t polarisation) {
  const std::size_t c = polarisation;
  const std::size_t d = polarisation + 2;
  const double eta_c = holds(silent, c) ? station.detectors[c].registering : 0;
  const double eta_d = holds(silent, d) ? station.detectors[d].registering : 0;
  const double amplitude =
      std::sqrt(station.right_transmittance * station.left_transmittance * station.indistinguishability);
  return {1 - (eta_c + eta_d) * station.right_transmittance / 2, 1 - (eta_c + eta_d) * station.left_transmittance / 2,
          -(eta_c - eta_d) * amplitude / 2};
}

// 1 - sum eta t r r^T over the silent detectors, r = (cos, sin) for plus and (-sin, cos) for cross; a is its H element.
ChainBinary64::Block ChainBinary64::end_block(const End& end, DetectorSet silent, double angle) {
  const double cosine = std::cos(angle);
  const double sine = std::sin(angle);
  const double plus = holds(silent, 0) ? end.detectors[0].registering * end.transmittance : 0;
  const double cross = holds(silent, 1) ? end.detectors[1].registering * end.transmittance : 0;
  return {1 - plus * cosine * cosine - cross * sine * sine, 1 - plus * sine * sine - cross * cosine * cosine,
          (cross - plus) * cosine * sine};
}

double ChainBinary64::dark_factor(DetectorSet silent) const {
  double product = 1;
  for (const Station& station : stations_) {
    product *= quiet(station.detectors, station.background, silent);
    silent >>= 4U;
  }
  return product * quiet(left_end_.detectors, left_end_.background, silent) *
         quiet(right_end_.detectors, right_end_.background, silent >> 2U);
}

double ChainBinary64::no_click(DetectorSet silent, bool corrected) const {
  const std::size_t count = stations_.size();
  const DetectorSet at_ends = silent >> (4 * count);
  const Block left = end_block(left_end_, at_ends, left_end_.angle);
  const Block right = end_block(right_end_, at_ends >> 2U, corrected ? -right_end_.angle : right_end_.angle);
  Ring ring;
  ring.pass_block({left.b, left.a, left.x});
  for (std::size_t k = 0; k <= count; ++k) {
    ring.pass_source(pair_parameters_[k]);
    if (k < count) ring.pass_block(polarisation_block(stations_[k], silent >> (4 * k), horizontal));
  }
  ring.pass_block(right);
  for (std::size_t k = count + 1; k-- > 0;) {
    ring.pass_source(pair_parameters_[k]);
    if (k == 0) break;
    const Block block = polarisation_block(stations_[k - 1], silent >> (4 * (k - 1)), vertical);
    ring.pass_block({block.b, block.a, block.x});
  }
  double vacuum = 1;
  for (const double lam : pair_parameters_) vacuum *= (1 - lam) * (1 - lam);
  return dark_factor(silent) * vacuum / ring.determinant();
}

}  // namespace heraldgauge::compare
