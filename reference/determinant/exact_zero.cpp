#include "reference/determinant/exact_zero.hpp"

#include "reference/determinant/end_block.hpp"
#include "reference/determinant/joint.hpp"
#include "reference/determinant/route.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Real;

constexpr double most_terms = 2e4;
const Field<Rational> exact;

Real representative(const Real& x) {
  if (x.is_zero() || x.is_one()) return x;
  return Rational(1, 2);
}

void represent(model::Detector& detector) {
  detector.efficiency = representative(detector.efficiency);
  detector.dark_probability = representative(detector.dark_probability);
}

void represent(model::Background& background) {
  if (!background.photons.is_zero()) background.photons = Real(1);
  background.modes = 1;
}

bool can_decide(const Chain& chain, Basis basis) {
  return !determinant_refusal(chain) && determinant_terms(chain) <= most_terms &&
         are_rational(effective_angles(chain, angles_of(chain, basis)));
}

Chain with_right_angle(const Chain& chain, const Rational& right_deg) {
  Chain turned = chain;
  turned.right_end.analyser_deg = right_deg;
  return turned;
}

}  // namespace

Chain zero_pattern_of(const Chain& chain) {
  Chain simple = chain;
  for (model::Source& source : simple.sources) source.pair_parameter = representative(source.pair_parameter);
  for (auto* arms : {&simple.left_arms, &simple.right_arms}) {
    for (model::Arm& arm : *arms) arm.transmittance = representative(arm.transmittance);
  }
  for (model::Station& station : simple.stations) {
    station.indistinguishability = representative(station.indistinguishability);
    for (model::Detector& detector : station.detectors) represent(detector);
    represent(station.background);
  }
  for (model::End* end : {&simple.left_end, &simple.right_end}) {
    for (model::Detector& detector : end->detectors) represent(detector);
    represent(end->background);
  }
  return simple;
}

std::optional<EndTable<bool>> exact_zeros(const Chain& chain, Basis basis) {
  const Chain simple = zero_pattern_of(chain);
  if (!can_decide(simple, basis)) return std::nullopt;
  const EndTable<Rational> table = joint_table(exact, simple, basis);
  EndTable<bool> zeros{};
  for (std::size_t l = 0; l < 4; ++l) {
    for (std::size_t r = 0; r < 4; ++r) zeros.joint[l][r] = table.joint[l][r] == 0;
  }
  return zeros;
}

std::optional<bool> is_exactly_zero_herald(const Chain& chain) {
  const Chain simple = zero_pattern_of(chain);
  if (!can_decide(simple, Basis::rectilinear)) return std::nullopt;
  return herald_probability(exact, simple) == 0;
}

std::optional<bool> is_exactly_zero_pattern(const Chain& chain, const model::Pattern& pattern) {
  const Chain simple = zero_pattern_of(chain);
  if (!can_decide(simple, Basis::analyser)) return std::nullopt;
  return pattern_probability(exact, simple, pattern) == 0;
}

std::optional<bool> is_exactly_zero_coincidence(const Chain& chain, const Rational& right_deg) {
  const auto zeros = exact_zeros(with_right_angle(chain, right_deg), Basis::analyser);
  if (!zeros) return std::nullopt;
  return zeros->joint[plus_bit][plus_bit];
}

bool is_zero_at_every_angle(const Chain& chain) {
  for (const long offset : {0L, 90L}) {
    const Rational origin = chain.station_count() == 0 ? chain.left_end.analyser_deg : Rational(0);
    const auto zeros = exact_zeros(with_right_angle(chain, origin + offset), Basis::analyser);
    if (!zeros || !zeros->joint[plus_bit][plus_bit] || !zeros->joint[plus_bit][plus_bit | cross_bit]) return false;
  }
  return true;
}

}  // namespace heraldgauge::reference
