#include <algorithm>
#include <cmath>

#include "compare/fock/departure.hpp"
#include "compare/fock/weights.hpp"

namespace heraldgauge::compare::fock {
namespace {

double log2_beyond_model(double lam, long m) {
  const auto n = static_cast<double>(m) + 1;
  return n * std::log2(lam) + std::log2(1 + n * (1 - lam));
}

double log2_beyond_poisson(double mean, long m) {
  const auto n = static_cast<double>(m) + 1;
  return n * std::log2(mean) - std::lgamma(n + 1) / std::log(2.0);
}

// The smallest m >= 1 whose estimate is below the aim; a source without pairs keeps none, an ideal one a single pair.
std::vector<long> smallest_cuts(const model::Chain& chain, double log2_tail, bool poisson) {
  const double aim = log2_tail - std::log2(static_cast<double>(chain.sources.size()));
  std::vector<long> cuts;
  for (const model::Source& source : chain.sources) {
    const double x = to_binary64(poisson ? mean_pairs(source) : source.pair_parameter);
    const bool ideal = source.kind == model::SourceKind::ideal_pair && !poisson;
    long m = x == 0 ? 0 : 1;
    while (x > 0 && !ideal && m < 1000 && (poisson ? log2_beyond_poisson(x, m) : log2_beyond_model(x, m)) > aim) ++m;
    cuts.push_back(m);
  }
  return cuts;
}

}  // namespace

std::vector<long> cuts_for_model(const model::Chain& chain, double log2_tail) {
  return smallest_cuts(chain, log2_tail, false);
}
std::vector<long> cuts_for_poisson(const model::Chain& chain, double log2_tail) {
  return smallest_cuts(chain, log2_tail, true);
}

Interval tail_of_model(const model::Chain& chain, const std::vector<long>& cuts, reference::Precision bits) {
  Interval sum(bits);
  const Interval one(1L, bits);
  for (std::size_t k = 0; k < cuts.size(); ++k) {
    if (chain.sources[k].kind == model::SourceKind::ideal_pair) continue;
    const Interval lam = reference::enclose(chain.sources[k].pair_parameter, bits);
    const long n = cuts[k] + 1;
    sum += reference::power(lam, static_cast<unsigned long>(n)) * (one + Interval(n, bits) * (one - lam));
  }
  return sum;
}

Interval tail_of_poisson(const model::Chain& chain, const std::vector<long>& cuts, reference::Precision bits) {
  Interval sum(bits);
  for (std::size_t k = 0; k < cuts.size(); ++k) {
    const Interval mean = reference::enclose(mean_pairs(chain.sources[k]), bits);
    Interval term(1L, bits);
    for (long n = 1; n <= cuts[k] + 1; ++n) term = term * mean / Interval(n, bits);
    sum += term;
  }
  return sum;
}

Description model_description(const model::Chain& chain, const std::vector<long>& cuts) {
  Description description;
  description.chain = chain;
  for (std::size_t k = 0; k < cuts.size(); ++k) description.weights.push_back(model_weights(chain.sources[k], cuts[k]));
  return description;
}

}  // namespace heraldgauge::compare::fock
