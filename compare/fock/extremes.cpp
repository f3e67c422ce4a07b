#include "compare/fock/extremes.hpp"

#include <cmath>
#include <numbers>

namespace heraldgauge::compare::fock {
namespace {

struct Jet {
  double value = 0, first = 0, second = 0;
};

// Only the part that varies, so that a small variation on a large mean keeps its digits.
Jet varying_part(const Harmonics& harmonics, double phi) {
  Jet jet;
  for (std::size_t q = 1; q < harmonics.cosine.size(); ++q) {
    const auto n = static_cast<double>(q);
    const double c = std::cos(n * phi), s = std::sin(n * phi);
    const double even = harmonics.cosine[q] * c + harmonics.sine[q] * s;
    jet.value += even;
    jet.first += n * (harmonics.sine[q] * c - harmonics.cosine[q] * s);
    jet.second -= n * n * even;
  }
  return jet;
}

double polished(const Harmonics& harmonics, double phi, double sign) {
  for (int i = 0; i < 8; ++i) {
    const Jet jet = varying_part(harmonics, phi);
    if (jet.second == 0) break;
    const double next = phi - jet.first / jet.second;
    if (!(sign * varying_part(harmonics, next).value >= sign * jet.value)) break;
    phi = next;
  }
  return phi;
}

double angle_of_largest(const Harmonics& harmonics, double sign) {
  const int samples = 64 * static_cast<int>(harmonics.cosine.size());
  double best = 0;
  for (int i = 1; i < samples; ++i) {
    const double phi = 2 * std::numbers::pi * i / samples;
    if (sign * varying_part(harmonics, phi).value > sign * varying_part(harmonics, best).value) best = phi;
  }
  return polished(harmonics, best, sign);
}

}  // namespace

Harmonics harmonics_of(const std::vector<double>& values) {
  const std::size_t count = values.size(), last = count / 2;
  Harmonics harmonics{std::vector<double>(last + 1, 0), std::vector<double>(last + 1, 0)};
  for (std::size_t q = 0; q <= last; ++q) {
    const double share = (q == 0 ? 1.0 : 2.0) / static_cast<double>(count);
    for (std::size_t j = 0; j < count; ++j) {
      const double phase = 2 * std::numbers::pi * static_cast<double>(q * j % count) / static_cast<double>(count);
      harmonics.cosine[q] += share * values[j] * std::cos(phase);
      harmonics.sine[q] += share * values[j] * std::sin(phase);
    }
  }
  return harmonics;
}

ExtremeAngles extreme_angles(const Harmonics& harmonics) {
  return {angle_of_largest(harmonics, 1), angle_of_largest(harmonics, -1)};
}

}  // namespace heraldgauge::compare::fock
