#include "compare/fock/weights.hpp"

namespace heraldgauge::compare::fock {

using model::Rational;
using model::Real;

std::vector<Real> model_weights(const model::Source& source, long cut) {
  const Real& x = source.pair_parameter;
  if (source.kind == model::SourceKind::ideal_pair) {
    std::vector<Real> weights{Real(1) - x};
    if (cut > 0) weights.push_back(x / Real(2));
    return weights;
  }
  std::vector<Real> weights{(Real(1) - x) * (Real(1) - x)};
  for (long n = 1; n <= cut; ++n) weights.push_back(weights.back() * x);
  return weights;
}

Real mean_pairs(const model::Source& source) {
  const Real& x = source.pair_parameter;
  return source.kind == model::SourceKind::ideal_pair ? x : Real(2) * x / (Real(1) - x);
}

std::vector<Real> poisson_weights(const model::Source& source, long cut) {
  const Real mean = mean_pairs(source);
  std::vector<Real> weights;
  Real probability = Real::exponential(Real(0) - mean);
  for (long n = 0; n <= cut; ++n) {
    if (n > 0) probability = probability * mean / Real(Rational(n));
    weights.push_back(probability / Real(Rational(n + 1)));
  }
  return weights;
}

Real kept_probability(const std::vector<Real>& weights) {
  Real sum = 0;
  for (std::size_t n = 0; n < weights.size(); ++n) sum = sum + Real(Rational(static_cast<long>(n) + 1)) * weights[n];
  return sum;
}

std::vector<Real> renormalised(const std::vector<Real>& weights) {
  const Real kept = kept_probability(weights);
  std::vector<Real> result;
  for (const Real& weight : weights) result.push_back(weight / kept);
  return result;
}

}  // namespace heraldgauge::compare::fock
