#include "compare/subset_sum/silent_detectors.hpp"

#include <cmath>
#include <numbers>

#include "compare/binary64.hpp"

namespace heraldgauge::compare {
namespace {

constexpr std::size_t horizontal = 0;
constexpr std::size_t vertical = 1;

bool holds(DetectorSet set, std::size_t detector) { return (set >> detector & 1U) != 0; }

template <class Number>
Number nearest(const model::Real& x) {
  return static_cast<Number>(to_binary64(x));
}

}  // namespace

// The running product W of 2x2 matrices, each new one multiplied from the left, and the product kappa of off-diagonals.
template <class Number>
class SilentDetectors<Number>::Ring {
 public:
  void pass_source(Number lam) {
    multiply(0, lam, 1, 0);
    kappa_ *= std::sqrt(lam);
  }
  void pass_block(const Block& block) {
    multiply(-block.a, 1, block.x * block.x - block.a * block.b, block.b);
    kappa_ *= block.x;
  }
  Number determinant() const { return w00_ + w11_ - 2 * kappa_; }

 private:
  void multiply(Number t00, Number t01, Number t10, Number t11) {
    const Number w00 = t00 * w00_ + t01 * w10_;
    const Number w01 = t00 * w01_ + t01 * w11_;
    const Number w10 = t10 * w00_ + t11 * w10_;
    const Number w11 = t10 * w01_ + t11 * w11_;
    w00_ = w00, w01_ = w01, w10_ = w10, w11_ = w11;
  }

  Number w00_ = 1, w01_ = 0, w10_ = 0, w11_ = 1;
  Number kappa_ = 1;
};

template <class Number>
typename SilentDetectors<Number>::Detector SilentDetectors<Number>::in_numbers(const model::Detector& detector) {
  return {nearest<Number>(detector.registering_probability()),
          nearest<Number>(model::Real(1) - detector.dark_probability)};
}

template <class Number>
typename SilentDetectors<Number>::Background SilentDetectors<Number>::in_numbers(const model::Background& background) {
  return {nearest<Number>(background.photons), static_cast<Number>(background.modes)};
}

template <class Number>
typename SilentDetectors<Number>::End SilentDetectors<Number>::in_numbers(const model::End& end,
                                                                          const model::Arm& arm) {
  return {nearest<Number>(arm.transmittance),
          nearest<Number>(end.analyser_deg) * std::numbers::pi_v<Number> / 180,
          {in_numbers(end.detectors[0]), in_numbers(end.detectors[1])},
          in_numbers(end.background)};
}

template <class Number>
SilentDetectors<Number>::SilentDetectors(const model::Chain& chain)
    : left_end_(in_numbers(chain.left_end, chain.left_arms.front())),
      right_end_(in_numbers(chain.right_end, chain.right_arms.back())) {
  for (const model::Source& source : chain.sources) pair_parameters_.push_back(nearest<Number>(source.pair_parameter));
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    const model::Station& station = chain.stations[k];
    stations_.push_back({nearest<Number>(chain.right_arms[k].transmittance),
                         nearest<Number>(chain.left_arms[k + 1].transmittance),
                         nearest<Number>(station.indistinguishability),
                         {in_numbers(station.detectors[0]), in_numbers(station.detectors[1]),
                          in_numbers(station.detectors[2]), in_numbers(station.detectors[3])},
                         in_numbers(station.background)});
  }
}

// No dark event in the silent detectors of a place: prod (1-d) times (1 + b sum eta/(F M))^-M.
template <class Number>
template <std::size_t count>
Number SilentDetectors<Number>::quiet(const std::array<Detector, count>& detectors, const Background& background,
                                      DetectorSet silent) {
  Number product = 1;
  Number registering = 0;
  for (std::size_t j = 0; j < count; ++j) {
    if (!holds(silent, j)) continue;
    product *= detectors[j].quiet;
    registering += detectors[j].registering;
  }
  const Number modes = background.modes;
  return product * std::pow(1 + background.photons * registering / (static_cast<Number>(count) * modes), -modes);
}

// Entrance R, exit L; the detectors c and d of one polarisation, d with the opposite sign of interference.
template <class Number>
typename SilentDetectors<Number>::Block SilentDetectors<Number>::polarisation_block(const Station& station,
                                                                                    DetectorSet silent,
                                                                                    std::size_t polarisation) {
  const std::size_t c = polarisation;
  const std::size_t d = polarisation + 2;
  const Number eta_c = holds(silent, c) ? station.detectors[c].registering : 0;
  const Number eta_d = holds(silent, d) ? station.detectors[d].registering : 0;
  const Number amplitude =
      std::sqrt(station.right_transmittance * station.left_transmittance * station.indistinguishability);
  return {1 - (eta_c + eta_d) * station.right_transmittance / 2, 1 - (eta_c + eta_d) * station.left_transmittance / 2,
          -(eta_c - eta_d) * amplitude / 2};
}

// 1 - sum eta t r r^T over the silent detectors, r = (cos, sin) for plus and (-sin, cos) for cross; a is its H element.
template <class Number>
typename SilentDetectors<Number>::Block SilentDetectors<Number>::end_block(const End& end, DetectorSet silent,
                                                                           Number angle) {
  const Number cosine = std::cos(angle);
  const Number sine = std::sin(angle);
  const Number plus = holds(silent, 0) ? end.detectors[0].registering * end.transmittance : 0;
  const Number cross = holds(silent, 1) ? end.detectors[1].registering * end.transmittance : 0;
  return {1 - plus * cosine * cosine - cross * sine * sine, 1 - plus * sine * sine - cross * cosine * cosine,
          (cross - plus) * cosine * sine};
}

template <class Number>
Number SilentDetectors<Number>::dark_factor(DetectorSet silent) const {
  Number product = 1;
  for (const Station& station : stations_) {
    product *= quiet(station.detectors, station.background, silent);
    silent >>= 4U;
  }
  return product * quiet(left_end_.detectors, left_end_.background, silent) *
         quiet(right_end_.detectors, right_end_.background, silent >> 2U);
}

template <class Number>
Number SilentDetectors<Number>::no_click(DetectorSet silent, bool corrected) const {
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
  Number vacuum = 1;
  for (const Number lam : pair_parameters_) vacuum *= (1 - lam) * (1 - lam);
  return dark_factor(silent) * vacuum / ring.determinant();
}

template class SilentDetectors<float>;
template class SilentDetectors<double>;

}  // namespace heraldgauge::compare
