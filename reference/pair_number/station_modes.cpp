#include "reference/pair_number/dark_weights.hpp"
#include "reference/pair_number/station_operator.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Real;

// 0 where both are the same expression, also where it is irrational.
Real difference(const Real& a, const Real& b) { return a == b ? Real(0) : a - b; }

}  // namespace

ModePair station_modes(const PolarisationAsk& ask, const StationPlace& place, Precision bits) {
  const Real half = model::Rational(1, 2);
  std::array<Real, 2> half_eta;
  for (std::size_t j = 0; j < 2; ++j) {
    if (is_looked_at(ask.asks[j])) half_eta[j] = half * ask.detectors[j].registering_probability();
  }
  const Interval coupling = enclose(
      Real::square_root(place.first_transmittance * place.second_transmittance * place.station.indistinguishability),
      bits);
  const auto enclosed = [bits](const Real& value) { return enclose(value, bits); };
  const Real sum = half_eta[0] + half_eta[1];
  ModePair modes;
  modes.a.push_back({{0, 0}, 0, enclosed(difference(1, sum * place.first_transmittance))});
  modes.b.push_back({{0, 0}, 0, enclosed(difference(1, sum * place.second_transmittance))});
  modes.x.push_back({{0, 0}, 0, enclosed(difference(half_eta[1], half_eta[0])) * coupling});
  for (std::size_t j = 0; j < 2; ++j) {
    const std::array<long, 2> counted{j == 0 ? 1L : 0L, j == 1 ? 1L : 0L};
    const Interval towards = enclosed(half_eta[j]) * coupling;
    modes.a.push_back({counted, 0, enclosed(half_eta[j] * place.first_transmittance)});
    modes.b.push_back({counted, 0, enclosed(half_eta[j] * place.second_transmittance)});
    modes.x.push_back({counted, 0, j == 0 ? towards : -towards});
  }
  modes.x_down = modes.x;
  return modes;
}

}  // namespace heraldgauge::reference::pair_number
