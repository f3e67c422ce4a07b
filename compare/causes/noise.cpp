#include "compare/causes/noise.hpp"

#include <fmt/format.h>

#include <algorithm>
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

// The probability per trial of what a quantity is conditional on; nothing for quantities that are no simple share.
std::optional<double> events_per_trial(const Case& point, QuantityKind kind) {
  using enum QuantityKind;
  if (kind == herald_probability || kind == pattern_probability) return 1;
  if (kind != end_pattern && kind != model::QuantityKind::gain && kind != qber_rectilinear && kind != qber_diagonal)
    return std::nullopt;
  const auto values = values_of_model(point, {{herald_probability}, {model::QuantityKind::gain}});
  const bool known = values[0].status == fast::Status::computed && values[1].status == fast::Status::computed;
  if (!known) return std::nullopt;
  const double herald = fast::to_binary64(values[0].value);
  const bool of_events = kind == qber_rectilinear || kind == qber_diagonal;
  return of_events ? herald * fast::to_binary64(values[1].value) : herald;
}

// Deviation in standard deviations of a single trial, of every target of that kind; the others have none.
std::vector<std::optional<double>> deviations(const Data& data) {
  std::vector<std::optional<double>> result;
  for (const Target& target : data.targets) {
    const auto events = events_per_trial(data.cases[target.point], data.quantities[target.quantity].kind);
    const double unit = std::ldexp(1.0, static_cast<int>(target.exponent));
    const double variance = target.exact * (1 - target.exact * unit);  // in units of 2^exponent
    if (!events || variance <= 0 || unit == 0) {
      result.emplace_back();
    } else {
      result.emplace_back((target.given - target.exact) * std::sqrt(unit * *events / variance));
    }
  }
  return result;
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

std::vector<Hypothesis> shot_sampling(const Data& data) {
  const std::vector<std::optional<double>> single = deviations(data);
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
  for (std::size_t i = 0; i < single.size(); ++i) {
    if (single[i]) found.prediction[i] = data.targets[i].given;  // any number within the scatter
  }
  found.score = score(data, found.prediction);
  return {std::move(found)};
}

}  // namespace heraldgauge::compare
