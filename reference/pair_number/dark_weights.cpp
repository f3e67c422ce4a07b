#include "reference/pair_number/dark_weights.hpp"

#include <numeric>

namespace heraldgauge::reference::pair_number {
namespace {

using model::Ask;
using model::Detector;
using model::Real;

// What the dark events of one detector must do.
struct DarkAsk {
  enum class Kind { anything, silent, fires, exactly } kind;
  long events = 0;
};

DarkAsk dark_ask(const Ask& ask, long order) {
  switch (ask.kind) {
    case Ask::Kind::not_looked_at:
      return {DarkAsk::Kind::anything};
    case Ask::Kind::silent:
      return {DarkAsk::Kind::silent};
    case Ask::Kind::clicks:
      return {order == 0 ? DarkAsk::Kind::fires : DarkAsk::Kind::anything};
    case Ask::Kind::counts:
      break;
  }
  return {DarkAsk::Kind::exactly, ask.photons - order};
}

// (1-d) mu^k/k!
Interval poisson(const Detector& detector, long events, Precision bits) {
  const Interval silent = enclose(Real(1) - detector.dark_probability, bits);
  if (events == 0) return silent;
  Interval result = silent * power(-logarithm(silent), static_cast<unsigned long>(events));
  for (long k = 2; k <= events; ++k) mpfi_div_si(result.raw(), result.raw(), k);
  return result;
}

Interval independent_probability(const Detector& detector, const DarkAsk& ask, Precision bits) {
  switch (ask.kind) {
    case DarkAsk::Kind::anything:
      return {1L, bits};
    case DarkAsk::Kind::silent:
      return enclose(Real(1) - detector.dark_probability, bits);
    case DarkAsk::Kind::fires:
      return enclose(detector.dark_probability, bits);
    case DarkAsk::Kind::exactly:
      break;
  }
  return poisson(detector, ask.events, bits);
}

// g(S): no dark event of either kind at the detectors S.
Interval all_silent(const DetectorGroup& group, const std::vector<bool>& set, Precision bits) {
  Real efficiencies;
  Interval product(1L, bits);
  for (std::size_t j = 0; j < set.size(); ++j) {
    if (!set[j]) continue;
    efficiencies = efficiencies + group.detectors[j].registering_probability();
    product *= enclose(Real(1) - group.detectors[j].dark_probability, bits);
  }
  const long modes = group.background.modes;
  const Real mean = group.background.photons * efficiencies / Real(model::Rational(group.place_detectors * modes));
  return product / power(enclose(Real(1) + mean, bits), static_cast<unsigned long>(modes));
}

// P(Z silent, T fire) = sum over U subset T of (-1)^|U| g(Z u U).
Interval inclusion_exclusion(const DetectorGroup& group, const std::vector<DarkAsk>& asks, Precision bits) {
  std::vector<std::size_t> firing;
  std::vector<bool> silent(asks.size());
  for (std::size_t j = 0; j < asks.size(); ++j) {
    if (asks[j].kind == DarkAsk::Kind::fires) firing.push_back(j);
    silent[j] = asks[j].kind == DarkAsk::Kind::silent || asks[j].kind == DarkAsk::Kind::exactly;
  }
  Interval sum(bits);
  for (unsigned long subset = 0; subset < 1UL << firing.size(); ++subset) {
    std::vector<bool> set = silent;
    for (std::size_t i = 0; i < firing.size(); ++i) set[firing[i]] = (subset >> i & 1) != 0;
    const Interval term = all_silent(group, set, bits);
    sum += __builtin_popcountl(subset) % 2 == 0 ? term : -term;
  }
  return sum;
}

// The sum cancels where the background is faint: work at more bits until the result has the bits asked for.
Interval background_probability(const DetectorGroup& group, const std::vector<DarkAsk>& asks, Precision bits) {
  Precision working = bits + 64;
  Interval sum = inclusion_exclusion(group, asks, working);
  while (!sum.is_exactly_zero() && sum.log2_width() > sum.log2_mignitude() - static_cast<double>(bits) &&
         working < 8 * bits + 4096) {
    working *= 2;
    sum = inclusion_exclusion(group, asks, working);
  }
  Interval result(bits);
  mpfi_set(result.raw(), sum.raw());
  return result;
}

Interval dark_probability(const DetectorGroup& group, const std::vector<DarkAsk>& asks, Precision bits) {
  if (!group.background.photons.is_zero()) return background_probability(group, asks, bits);
  Interval product(1L, bits);
  for (std::size_t j = 0; j < asks.size(); ++j) {
    if (asks[j].kind != DarkAsk::Kind::anything) product *= independent_probability(group.detectors[j], asks[j], bits);
  }
  return product;
}

// The next combination of orders, the last varying fastest; false after the last one.
bool advance(std::vector<long>& orders, const std::vector<Ask>& asks) {
  for (std::size_t j = orders.size(); j-- > 0;) {
    if (orders[j] < count_variable(asks[j]).top) {
      ++orders[j];
      return true;
    }
    orders[j] = 0;
  }
  return false;
}

}  // namespace

CountVariable count_variable(const Ask& ask) {
  if (ask.kind == Ask::Kind::clicks) return {CountVariable::Rule::idempotent, 1};
  if (ask.kind == Ask::Kind::counts) return {CountVariable::Rule::truncated, ask.photons};
  return {};
}

bool is_looked_at(const Ask& ask) { return ask.kind != Ask::Kind::not_looked_at; }

long DarkWeight::total_order() const { return std::accumulate(orders.begin(), orders.end(), 0L); }

std::vector<DarkWeight> dark_weights(const DetectorGroup& group, Precision bits) {
  std::vector<DarkWeight> weights;
  std::vector<long> orders(group.asks.size(), 0);
  do {
    std::vector<DarkAsk> asks;
    for (std::size_t j = 0; j < orders.size(); ++j) asks.push_back(dark_ask(group.asks[j], orders[j]));
    weights.push_back({orders, dark_probability(group, asks, bits)});
  } while (advance(orders, group.asks));
  return weights;
}

}  // namespace heraldgauge::reference::pair_number
