#include "compare/quantities_binary64.hpp"

#include <cmath>
#include <map>

#include "compare/other_chain.hpp"
#include "reference/quantities.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using reference::Basis;
using reference::EndTable;

double both_click(const EndTable<double>& table) {
  double sum = 0;
  for (std::size_t l = 1; l < 4; ++l) {
    for (std::size_t r = 1; r < 4; ++r) sum += table.joint[l][r];
  }
  return sum;
}

double erroneous(const EndTable<double>& table, bool agreement_expected) {
  double sum = 0;
  for (std::size_t l = 1; l < 4; ++l) {
    for (std::size_t r = 1; r < 4; ++r) {
      if (l == 3 || r == 3) {
        sum += table.joint[l][r] / 2;
      } else if ((l == r) != agreement_expected) {
        sum += table.joint[l][r];
      }
    }
  }
  return sum;
}

double entropy(double x) {
  if (x == 0 || x == 1) return 0;
  return -(x * std::log(x) + (1 - x) * std::log1p(-x)) / std::log(2.0);
}

class Evaluation {
 public:
  Evaluation(Probabilities64& probabilities, const Case& point) : probabilities_(probabilities), point_(point) {}

  Value value(const Quantity& quantity) {
    if (touches_capacities(quantity)) return values_of(point_, {quantity}).front();
    switch (quantity.kind) {
      case QuantityKind::herald_probability:
        return computed(quantity, probabilities_.herald());
      case QuantityKind::trials_per_herald:
        return ratio(quantity, 1, probabilities_.herald());
      case QuantityKind::pattern_probability:
        return pattern(quantity);
      case QuantityKind::end_pattern: {
        const auto left = static_cast<std::size_t>(quantity.outcome >> 2);
        const auto right = static_cast<std::size_t>(quantity.outcome & 3);
        return ratio(quantity, ends(Basis::analyser).joint[left][right], probabilities_.herald());
      }
      case QuantityKind::gain:
        return ratio(quantity, both_click(ends(Basis::rectilinear)), probabilities_.herald());
      case QuantityKind::qber_rectilinear:
        return error_rate(quantity, Basis::rectilinear);
      case QuantityKind::qber_diagonal:
        return error_rate(quantity, Basis::diagonal);
      case QuantityKind::visibility:
      case QuantityKind::visibility_deficit:
        return visibility(quantity);
      default:
        return key(quantity);
    }
  }

 private:
  static Value computed(const Quantity& quantity, double x) {
    if (!std::isfinite(x)) return {quantity, fast::Status::declined, "the sum is not a finite number", {}, ""};
    return {quantity, fast::Status::computed, "", scaled(x), ""};
  }
  static Value ratio(const Quantity& quantity, double numerator, double denominator) {
    if (denominator == 0) return {quantity, fast::Status::undefined, "the probability divided by is 0", {}, ""};
    return computed(quantity, numerator / denominator);
  }
  const EndTable<double>& ends(Basis basis) {
    const auto found = ends_.find(basis);
    return found != ends_.end() ? found->second : ends_.emplace(basis, probabilities_.ends(basis)).first->second;
  }
  Value pattern(const Quantity& quantity) {
    const auto probability = point_.pattern ? probabilities_.pattern(*point_.pattern) : std::nullopt;
    if (!probability) return {quantity, fast::Status::declined, "this pattern is not served", {}, ""};
    return computed(quantity, *probability);
  }
  Value error_rate(const Quantity& quantity, Basis basis) {
    const bool agreement = basis == Basis::diagonal ? reference::diagonal_agreement_expected
                                                    : reference::rectilinear_agreement_expected(point_.chain);
    return ratio(quantity, erroneous(ends(basis), agreement), both_click(ends(basis)));
  }
  Value visibility(const Quantity& quantity) {
    const auto extremes = probabilities_.coincidence();
    if (!extremes) return {quantity, fast::Status::declined, "the visibility is not served", {}, ""};
    const double sum = extremes->largest + extremes->smallest;
    const bool deficit = quantity.kind == QuantityKind::visibility_deficit;
    return ratio(quantity, deficit ? 2 * extremes->smallest : extremes->largest - extremes->smallest, sum);
  }
  Value key(const Quantity& quantity) {
    const Value rectilinear = error_rate(quantity, Basis::rectilinear),
                diagonal = error_rate(quantity, Basis::diagonal);
    for (const Value& rate : {rectilinear, diagonal}) {
      if (rate.status != fast::Status::computed) return rate;
      const double e = fast::to_binary64(rate.value);
      if (!(e >= 0 && e <= 1)) return {quantity, fast::Status::declined, "an error rate lies outside [0, 1]", {}, ""};
    }
    const double correction = point_.chain.protocol.error_correction_factor.get_d();
    const double share =
        1 - correction * entropy(fast::to_binary64(rectilinear.value)) - entropy(fast::to_binary64(diagonal.value));
    const double events =
        both_click(ends(Basis::rectilinear)) * point_.chain.protocol.sifting.get_d() * std::fmax(0, share);
    return quantity.kind == QuantityKind::key_rate ? computed(quantity, events)
                                                   : ratio(quantity, events, probabilities_.herald());
  }

  Probabilities64& probabilities_;
  const Case& point_;
  std::map<Basis, EndTable<double>> ends_;
};

}  // namespace

std::vector<Value> quantities_of(Probabilities64& probabilities, const Case& point,
                                 const std::vector<Quantity>& quantities) {
  Evaluation evaluation(probabilities, point);
  std::vector<Value> values;
  for (const Quantity& quantity : quantities) values.push_back(evaluation.value(quantity));
  return values;
}

fast::Scaled scaled(double x) {
  int exponent = 0;
  const double significand = std::frexp(x, &exponent);
  return {significand, significand == 0 ? 0 : exponent};
}

}  // namespace heraldgauge::compare
