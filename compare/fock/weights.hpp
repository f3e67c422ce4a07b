#pragma once
// Weights of the pair numbers of a source: w(n) = pi(n)/(n+1), exact.

#include <vector>

#include "reference/model/chain.hpp"

namespace heraldgauge::compare::fock {

// The model's: lam^n (1-lam)^2 for a squeezed source, n = 0..cut; 1-p, p/2 for an ideal pair, whatever the cut above 0.
std::vector<model::Real> model_weights(const model::Source& source, long cut);

// Poisson pair numbers of the same mean 2 mu: exp(-2 mu) (2 mu)^n / (n! (n+1)).
std::vector<model::Real> poisson_weights(const model::Source& source, long cut);

// sum over n of (n+1) w(n), the probability that is kept.
model::Real kept_probability(const std::vector<model::Real>& weights);
// The same weights divided by it.
std::vector<model::Real> renormalised(const std::vector<model::Real>& weights);

// 2 lam/(1-lam), or the probability of an ideal pair.
model::Real mean_pairs(const model::Source& source);

}  // namespace heraldgauge::compare::fock
