#include "compare/causes/data.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <string>

namespace heraldgauge::compare {
namespace {

using model::Rational;

// A distance beyond this is no more telling.
constexpr double largest_distance = 1e6;

// The exponent of the power of two next above |x|; 0 for zero.
long exponent_of(const Rational& x) {
  if (x == 0) return 0;
  return static_cast<long>(mpz_sizeinbase(x.get_num_mpz_t(), 2)) -
         static_cast<long>(mpz_sizeinbase(x.get_den_mpz_t(), 2));
}

double scaled(const Rational& x, long exponent) {
  Rational shifted = x;
  if (exponent > 0) {
    mpq_div_2exp(shifted.get_mpq_t(), x.get_mpq_t(), static_cast<mp_bitcnt_t>(exponent));
  } else {
    mpq_mul_2exp(shifted.get_mpq_t(), x.get_mpq_t(), static_cast<mp_bitcnt_t>(-exponent));
  }
  return shifted.get_d();
}

Target target_of(const Datum& datum, std::size_t point) {
  Target target;
  target.point = point;
  target.quantity = datum.quantity;
  target.wrong = datum.wrong();
  const Rational exact = (datum.exact.lower + datum.exact.upper) / 2;
  target.exponent = std::max(exponent_of(datum.given), exponent_of(exact));
  if (datum.given == 0 || exact == 0)
    target.exponent = datum.given == 0 ? exponent_of(exact) : exponent_of(datum.given);
  target.given = scaled(datum.given, target.exponent);
  target.exact = scaled(exact, target.exponent);
  const double least = evaluation_floor * std::abs(target.given);
  target.below = std::max(scaled(datum.given - datum.acceptance.lower, target.exponent), least);
  target.above = std::max(scaled(datum.acceptance.upper - datum.given, target.exponent), least);
  return target;
}

std::string key_of(const Changes& changes) {
  std::string key;
  for (const auto& [name, value] : changes) key += name + "=" + model::value_text(value) + "\x1f";
  return key;
}

}  // namespace

Data data_of(const std::vector<Datum>& data, const Subject& subject) {
  Data result;
  result.quantities = subject.quantities;
  std::map<std::string, std::size_t> points;
  for (const Datum& datum : data) {
    const auto [place, added] = points.try_emplace(key_of(datum.changes), result.cases.size());
    if (added) result.cases.push_back(case_with(subject.scenario, datum.changes).value());
    result.targets.push_back(target_of(datum, place->second));
    result.wrong_count += datum.wrong() ? 1 : 0;
  }
  return result;
}

double in_unit_of(const Target& target, const fast::Scaled& value) {
  const long shift = value.exponent - target.exponent;
  if (shift > 4000) return std::copysign(INFINITY, value.significand);
  if (shift < -4000) return 0;
  return std::ldexp(value.significand, static_cast<int>(shift));
}

double distance(const Target& target, double prediction) {
  const double difference = prediction - target.given;
  if (difference == 0) return 0;
  const double tolerance = difference > 0 ? target.above : target.below;
  if (!(std::abs(difference) < INFINITY) || tolerance == 0) return largest_distance;
  return std::min(std::abs(difference) / tolerance, largest_distance);
}

Score score(const Data& data, const Prediction& prediction) {
  Score result;
  double sum = 0;
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    const Target& target = data.targets[i];
    const double off = prediction[i] ? distance(target, *prediction[i]) : largest_distance;
    sum += off * off;
    if (off <= 1) {
      ++result.explained;
      result.wrong_explained += target.wrong ? 1 : 0;
    } else {
      result.right_broken += target.wrong ? 0 : 1;
    }
  }
  result.residual = data.targets.empty() ? 0 : std::sqrt(sum / static_cast<double>(data.targets.size()));
  return result;
}

Prediction exact_prediction(const Data& data) {
  Prediction prediction;
  for (const Target& target : data.targets) prediction.emplace_back(target.exact);
  return prediction;
}

}  // namespace heraldgauge::compare
