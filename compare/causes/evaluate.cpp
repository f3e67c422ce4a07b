#include "compare/causes/evaluate.hpp"

#include <cmath>
#include <functional>

#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::Rational;

// More than the accuracy to which causes are told apart.
constexpr int digits = 14;

using Enclose = std::function<std::vector<CertifiedValue>(const std::vector<Quantity>&)>;

fast::Scaled scaled(const Rational& x) {
  long numerator_exponent = 0, denominator_exponent = 0;
  const double numerator = mpz_get_d_2exp(&numerator_exponent, x.get_num_mpz_t());
  const double denominator = mpz_get_d_2exp(&denominator_exponent, x.get_den_mpz_t());
  int exponent = 0;
  const double significand = std::frexp(numerator / denominator, &exponent);
  return {significand, x == 0 ? 0 : numerator_exponent - denominator_exponent + exponent};
}

// Replaces the values that were declined.
std::vector<Value> completed(std::vector<Value> values, const Enclose& enclose) {
  std::vector<Quantity> missing;
  for (const Value& value : values) {
    if (value.status == fast::Status::declined) missing.push_back(value.quantity);
  }
  if (missing.empty()) return values;
  const std::vector<CertifiedValue> certified = enclose(missing);
  std::size_t next = 0;
  for (Value& value : values) {
    if (value.status != fast::Status::declined) continue;
    const CertifiedValue& known = certified[next++];
    if (!known.enclosure) continue;
    value.status = fast::Status::computed;
    value.value = scaled((known.enclosure->lower + known.enclosure->upper) / 2);
  }
  return values;
}

}  // namespace

std::vector<Value> values_of_departure(const Departure& departure, const Setting& setting, const Case& point,
                                       const std::vector<Quantity>& quantities) {
  std::vector<Value> values = departure.evaluate(point, quantities, setting);
  if (!departure.enclose) return values;
  return completed(std::move(values), [&](const std::vector<Quantity>& missing) {
    return departure.enclose(point, missing, setting, digits);
  });
}

std::vector<Value> values_of_model(const Case& point, const std::vector<Quantity>& quantities) {
  return completed(values_of(point, quantities),
                   [&](const std::vector<Quantity>& missing) { return certified_values_of(point, missing, digits); });
}

}  // namespace heraldgauge::compare
