#include "compare/causes/noise.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "compare/causes/evaluate.hpp"

namespace heraldgauge::compare {
namespace {

using model::QuantityKind;

constexpr std::size_t least_numbers = 8;
constexpr double most_trials = 1e11;         // nobody simulates more
constexpr double farthest = 4.5;             // standard deviations; a sample of hundreds hardly goes further
constexpr double largest_correlation = 0.5;  // between neighbours
constexpr double least_within_one = 0.45;    // share of a normal sample within one standard deviation is 0.68
constexpr double most_within_one = 0.92;

// What is counted at a point.
struct Shares {
  double herald, gain, rectilinear, diagonal;
};
std::optional<Shares> shares_of(const Case& point) {
  using enum QuantityKind;
  std::array<double, 4> shares{};
  std::size_t next = 0;
  for (const Value& value :
       values_of_model(point, {{herald_probability}, {gain}, {qber_rectilinear}, {qber_diagonal}})) {
    if (value.status != fast::Status::computed) return std::nullopt;
    shares[next++] = fast::to_binary64(value.value);
  }
  return Shares{shares[0], shares[1], shares[2], shares[3]};
}

// (1-x)/x: the variance of a share of one trial over its square.
double relative_variance(double share) { return (1 - share) / share; }

// e (1-e) h2'(e)^2: the variance of the entropy of an error rate of one event.
double entropy_variance(double rate) {
  if (rate <= 0 || rate >= 1) return 0;
  const double slope = std::log2((1 - rate) / rate);
  return rate * (1 - rate) * slope * slope;
}

// The variance of a quantity from one trial over its square, to first order.
double relative_variance(const Shares& shares, const model::Protocol& protocol, QuantityKind kind, double value) {
  using enum QuantityKind;
  const double f = protocol.error_correction_factor.get_d(), events = shares.herald * shares.gain;
  switch (kind) {
    case herald_probability:
    case pattern_probability:
      return relative_variance(value);
    case trials_per_herald:
      return relative_variance(shares.herald);
    case end_pattern:
    case gain:
      return relative_variance(value) / shares.herald;
    case qber_rectilinear:
    case qber_diagonal:
      return relative_variance(value) / events;
    case key_fraction:
    case key_rate: {
      const double kept = value / (shares.gain * protocol.sifting.get_d() * (kind == key_rate ? shares.herald : 1));
      const double of_entropies =
          (f * f * entropy_variance(shares.rectilinear) + entropy_variance(shares.diagonal)) / (kept * kept * events);
      return of_entropies + relative_variance(shares.gain) / shares.herald +
             (kind == key_rate ? relative_variance(shares.herald) : 0);
    }
    default:
      return 0;
  }
}

bool looks_normal(const std::vector<double>& scaled) {
  std::size_t positive = 0, within_one = 0;
  double product = 0, squares = 0;
  for (std::size_t i = 0; i < scaled.size(); ++i) {
    if (std::abs(scaled[i]) > farthest) return false;
    positive += scaled[i] > 0 ? 1 : 0;
    within_one += std::abs(scaled[i]) < 1 ? 1 : 0;
    squares += scaled[i] * scaled[i];
    if (i > 0) product += scaled[i] * scaled[i - 1];
  }
  const auto all = static_cast<double>(scaled.size());
  const double share = static_cast<double>(within_one) / all;
  const bool both_signs = static_cast<double>(positive) > 0.15 * all && static_cast<double>(positive) < 0.85 * all;
  return both_signs && share > least_within_one && share < most_within_one && product < largest_correlation * squares;
}

}  // namespace

std::vector<std::optional<double>> deviations_of_a_trial(const Data& data) {
  std::vector<std::optional<Shares>> shares;
  for (const Case& point : data.cases) shares.push_back(shares_of(point));
  std::vector<std::optional<double>> result(data.targets.size());
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    const Target& target = data.targets[i];
    if (!shares[target.point] || target.exact == 0) continue;
    const double value = std::ldexp(target.exact, static_cast<int>(target.exponent));
    const double variance = relative_variance(*shares[target.point], data.cases[target.point].chain.protocol,
                                              data.quantities[target.quantity].kind, value);
    if (variance > 0 && std::isfinite(variance)) {
      result[i] = (target.given - target.exact) / (std::abs(target.exact) * std::sqrt(variance));
    }
  }
  return result;
}

std::vector<Hypothesis> shot_sampling(const Data& data) {
  const std::vector<std::optional<double>> single = deviations_of_a_trial(data);
  std::vector<double> scaled;
  double squares = 0;
  for (const auto& one : single) {
    if (!one) continue;
    scaled.push_back(*one);
    squares += *one * *one;
  }
  if (scaled.size() < least_numbers || squares == 0) return {};
  const double trials = static_cast<double>(scaled.size()) / squares;
  for (double& one : scaled) one *= std::sqrt(trials);
  if (trials < 1 || trials > most_trials || !looks_normal(scaled)) return {};
  Hypothesis found;
  found.parts = {{"shot-sampling", "shortcut", fmt::format("about {:.2g} trials", trials),
                  "Numbers scatter as shares of a finite number of simulated trials do."}};
  found.complexity = complexity_of_pattern + complexity_of_setting;
  found.prediction = exact_prediction(data);
  found.from_the_table = true;
  for (std::size_t i = 0; i < single.size(); ++i) {
    if (single[i]) found.prediction[i] = data.targets[i].given;  // any number within the scatter
  }
  found.score = score(data, found.prediction);
  return {std::move(found)};
}

}  // namespace heraldgauge::compare
