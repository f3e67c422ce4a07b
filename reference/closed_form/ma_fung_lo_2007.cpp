#include "reference/closed_form/ma_fung_lo_2007.hpp"

namespace heraldgauge::reference {
namespace {

using model::Real;

bool is_plain(const model::End& end) {
  return end.detectors[0] == end.detectors[1] && end.detectors[0].kind == model::DetectorKind::threshold &&
         end.background.photons.is_zero();
}

Real dark_count_of(const model::End& end) {
  const Real quiet = Real(1) - end.detectors[0].dark_probability;
  return Real(1) - quiet * quiet;
}

}  // namespace

model::Expected<PairLink> pair_link_of(const model::Chain& chain) {
  const bool direct = chain.stations.empty() && chain.sources.front().kind == model::SourceKind::squeezed;
  if (!direct || !is_plain(chain.left_end) || !is_plain(chain.right_end)) {
    return model::Fault{{},
                        "the chain is not a direct pair link",
                        "no station, a squeezed source, two alike threshold detectors at each end, no background"};
  }
  const Real lam = chain.sources.front().pair_parameter;
  return PairLink{lam / (Real(1) - lam),
                  chain.left_arms.front().transmittance * chain.left_end.detectors[0].registering_probability(),
                  chain.right_arms.front().transmittance * chain.right_end.detectors[0].registering_probability(),
                  dark_count_of(chain.left_end), dark_count_of(chain.right_end)};
}

Interval gain(const PairLink& link, Precision bits) {
  const Interval one(1, bits);
  const Interval mu = enclose(link.mean_pairs, bits);
  const Interval eta_a = enclose(link.eta_left, bits);
  const Interval eta_b = enclose(link.eta_right, bits);
  const Interval quiet_a = one - enclose(link.dark_count_left, bits);
  const Interval quiet_b = one - enclose(link.dark_count_right, bits);
  return one - quiet_a / square(one + eta_a * mu) - quiet_b / square(one + eta_b * mu) +
         quiet_a * quiet_b / square(one + (eta_a + eta_b - eta_a * eta_b) * mu);
}

}  // namespace heraldgauge::reference
