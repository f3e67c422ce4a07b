// A factor, an offset, and rows that slipped: patterns that need no further evaluation.

#include <algorithm>
#include <cmath>
#include <functional>
#include <set>

#include "compare/causes/overlap.hpp"
#include "compare/causes/patterns.hpp"

namespace heraldgauge::compare {
namespace {

// Fewer numbers than this fit any constant.
constexpr std::size_t least_evidence = 3;

std::set<std::size_t> wrong_quantities(const Data& data) {
  std::set<std::size_t> quantities;
  for (const Target& target : data.targets) {
    if (target.wrong) quantities.insert(target.quantity);
  }
  return quantities;
}

// Targets of these quantities whose exact values are all different.
std::size_t different_values(const Data& data, const std::set<std::size_t>& quantities) {
  std::set<std::pair<long, double>> values;
  for (const Target& target : data.targets) {
    if (quantities.contains(target.quantity)) values.emplace(target.exponent, target.exact);
  }
  return values.size();
}

Hypothesis pattern(const std::string& id, const std::string& setting, const std::string& sentence, const Data& data,
                   Prediction prediction) {
  Hypothesis hypothesis;
  hypothesis.parts = {{id, "pattern", setting, sentence}};
  hypothesis.complexity = complexity_of_pattern;
  hypothesis.score = score(data, prediction);
  hypothesis.prediction = std::move(prediction);
  return hypothesis;
}

// In the target's unit, or at once in units of one.
double in_units_of_one(const Target& target, double x) { return std::ldexp(x, static_cast<int>(target.exponent)); }

std::vector<Hypothesis> constant_factor(const Data& data, const std::set<std::size_t>& quantities) {
  std::vector<Span> spans;
  for (const Target& target : data.targets) {
    if (!quantities.contains(target.quantity) || target.exact <= 0) continue;
    spans.push_back({(target.given - target.below) / target.exact, (target.given + target.above) / target.exact});
  }
  const auto overlap = largest_overlap(spans);
  if (!overlap || overlap->count < least_evidence) return {};
  const ShortNumber factor = shortest_in(overlap->common, Meaning::factor);
  Prediction prediction = exact_prediction(data);
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    if (quantities.contains(data.targets[i].quantity)) *prediction[i] *= factor.value;
  }
  return {pattern("constant-factor", factor.text,
                  "Every number is the exact one times the same factor: a unit, a convention?", data,
                  std::move(prediction))};
}

std::vector<Hypothesis> constant_offset(const Data& data, const std::set<std::size_t>& quantities) {
  std::vector<Span> spans;
  for (const Target& target : data.targets) {
    if (!quantities.contains(target.quantity)) continue;
    const double difference = target.given - target.exact;
    spans.push_back(
        {in_units_of_one(target, difference - target.below), in_units_of_one(target, difference + target.above)});
  }
  const auto overlap = largest_overlap(spans);
  if (!overlap || overlap->count < least_evidence) return {};
  const ShortNumber offset = shortest_in(overlap->common, Meaning::amount);
  Prediction prediction = exact_prediction(data);
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    const Target& target = data.targets[i];
    if (quantities.contains(target.quantity))
      *prediction[i] += std::ldexp(offset.value, static_cast<int>(-target.exponent));
  }
  return {pattern("constant-offset", offset.text, "The same amount is added to every number.", data,
                  std::move(prediction))};
}

// Indices of the targets of one quantity, in the order of the table.
std::vector<std::size_t> column_of(const Data& data, std::size_t quantity) {
  std::vector<std::size_t> column;
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    if (data.targets[i].quantity == quantity) column.push_back(i);
  }
  return column;
}

// The exact value of another row; rows beyond the ends of the table say nothing, so they count as given.
Prediction displaced(const Data& data, int shift) {
  Prediction prediction = exact_prediction(data);
  for (std::size_t quantity = 0; quantity < data.quantities.size(); ++quantity) {
    const std::vector<std::size_t> column = column_of(data, quantity);
    for (std::size_t row = 0; row < column.size(); ++row) {
      const Target& target = data.targets[column[row]];
      const auto other = static_cast<std::ptrdiff_t>(row) + shift;
      if (other < 0 || other >= static_cast<std::ptrdiff_t>(column.size())) {
        prediction[column[row]] = target.given;
        continue;
      }
      const Target& source = data.targets[column[static_cast<std::size_t>(other)]];
      prediction[column[row]] = std::ldexp(source.exact, static_cast<int>(source.exponent - target.exponent));
    }
  }
  return prediction;
}

}  // namespace

std::vector<Hypothesis> constant_patterns(const Data& data) {
  const std::set<std::size_t> quantities = wrong_quantities(data);
  if (different_values(data, quantities) < least_evidence) return {};
  std::vector<Hypothesis> found = constant_factor(data, quantities);
  for (Hypothesis& offset : constant_offset(data, quantities)) found.push_back(std::move(offset));
  return found;
}

std::vector<Hypothesis> shifted_rows(const Data& data) {
  std::vector<Hypothesis> found;
  if (data.cases.size() <= 2 * least_evidence) return found;
  for (const int shift : {-1, 1}) {
    const std::string setting = shift < 0 ? "one row down" : "one row up";
    found.push_back(
        pattern("shifted-rows", setting, "Each number belongs to the neighbouring row.", data, displaced(data, shift)));
  }
  return found;
}

std::vector<Hypothesis> round_off_pattern(const Data& data) {
  constexpr double largest_round_off = 1e-4;
  constexpr std::size_t least_rows = 8;
  std::vector<double> errors;
  for (const Target& target : data.targets) {
    if (target.wrong && target.exact != 0) errors.push_back((target.given - target.exact) / target.exact);
  }
  if (errors.size() < least_rows) return {};
  double largest = 0, product = 0, squares = 0;
  std::size_t positive = 0;
  for (std::size_t i = 0; i < errors.size(); ++i) {
    largest = std::max(largest, std::abs(errors[i]));
    positive += errors[i] > 0 ? 1 : 0;
    squares += errors[i] * errors[i];
    if (i > 0) product += errors[i] * errors[i - 1];
  }
  const bool both_signs = 4 * positive >= errors.size() && 4 * positive <= 3 * errors.size();
  if (largest > largest_round_off || !both_signs || product > squares / 2) return {};
  const double digits = std::floor(-std::log10(std::sqrt(squares / static_cast<double>(errors.size()))));
  Prediction prediction = exact_prediction(data);
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    if (data.targets[i].wrong) prediction[i] = data.targets[i].given;
  }
  Hypothesis found =
      pattern("round-off", std::to_string(static_cast<int>(digits)) + " digits",
              "Small differences of both signs without order, as rounding leaves them.", data, std::move(prediction));
  found.complexity += complexity_of_pattern;
  found.from_the_table = true;
  return {std::move(found)};
}

}  // namespace heraldgauge::compare
