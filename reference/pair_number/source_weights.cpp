#include "reference/pair_number/source_weights.hpp"

#include <algorithm>

namespace heraldgauge::reference::pair_number {

using model::Real;
using model::SourceKind;

std::optional<long> most_pairs(const model::Source& source) {
  if (source.pair_parameter.is_zero()) return 0;
  if (source.kind == SourceKind::ideal_pair) return 1;
  return std::nullopt;
}

bool keep_all_pairs(const std::vector<model::Source>& sources, const std::vector<long>& cutoffs) {
  return std::equal(sources.begin(), sources.end(), cutoffs.begin(), [](const model::Source& source, long cutoff) {
    const std::optional<long> most = most_pairs(source);
    return most && *most <= cutoff;
  });
}

std::vector<Interval> state_weights(const model::Source& source, long last, Precision bits) {
  const Interval parameter = enclose(source.pair_parameter, bits);
  const Interval rest = enclose(Real(1) - source.pair_parameter, bits);
  std::vector<Interval> weights;
  if (source.kind == SourceKind::ideal_pair) {
    weights.assign(static_cast<std::size_t>(last + 1), Interval(bits));
    weights[0] = rest;
    if (last >= 1) weights[1] = parameter * Interval(model::Rational(1, 2), bits);
    return weights;
  }
  weights.push_back(square(rest));
  for (long n = 1; n <= last; ++n) weights.push_back(weights.back() * parameter);
  return weights;
}

std::vector<Interval> pair_probabilities(const model::Source& source, long last, Precision bits) {
  std::vector<Interval> probabilities = state_weights(source, last, bits);
  for (long n = 1; n <= last; ++n) {
    Interval& probability = probabilities[static_cast<std::size_t>(n)];
    probability = probability * (n + 1);
  }
  return probabilities;
}

Interval probability_beyond(const model::Source& source, long m, Precision bits) {
  const std::optional<long> most = most_pairs(source);
  if (most && m >= *most) return Interval(bits);
  const Interval parameter = enclose(source.pair_parameter, bits);
  if (source.kind == SourceKind::ideal_pair) return parameter;
  const Interval rest = enclose(Real(1) - source.pair_parameter, bits);
  return power(parameter, static_cast<unsigned long>(m + 1)) * (Interval(1L, bits) + rest * (m + 1));
}

}  // namespace heraldgauge::reference::pair_number
