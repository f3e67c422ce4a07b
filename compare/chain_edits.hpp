#pragma once
// Visits every number of one kind in a chain, for departures that change them all alike, and a question that many ask.

#include "reference/model/chain.hpp"

namespace heraldgauge::compare {

template <class Edit>
void for_each_detector(model::Chain& chain, Edit&& edit) {
  for (model::Station& station : chain.stations) {
    for (model::Detector& detector : station.detectors) edit(detector);
  }
  for (model::End* end : {&chain.left_end, &chain.right_end}) {
    for (model::Detector& detector : end->detectors) edit(detector);
  }
}

template <class Edit>
void for_each_arm(model::Chain& chain, Edit&& edit) {
  for (model::Arm& arm : chain.left_arms) edit(arm);
  for (model::Arm& arm : chain.right_arms) edit(arm);
}

// Whether any place has a shared background.
inline bool has_background(const model::Chain& chain) {
  const auto has = [](const auto& place) { return !place.background.photons.is_zero(); };
  for (const model::Station& station : chain.stations) {
    if (has(station)) return true;
  }
  return has(chain.left_end) || has(chain.right_end);
}

// Squeezed sources only: an ideal pair source has a probability, which these conventions leave alone.
template <class Edit>
void for_each_squeezed_source(model::Chain& chain, Edit&& edit) {
  for (model::Source& source : chain.sources) {
    if (source.kind == model::SourceKind::squeezed) edit(source);
  }
}

// The mean pairs per polarisation, mu = lam/(1-lam), of every squeezed source times a factor: lam = mu/(1+mu).
inline void multiply_mean_pairs(model::Chain& chain, const model::Real& factor) {
  for_each_squeezed_source(chain, [&](model::Source& source) {
    const model::Real more = factor * source.pair_parameter;
    source.pair_parameter = more / (model::Real(1) - source.pair_parameter + more);
  });
}

}  // namespace heraldgauge::compare
