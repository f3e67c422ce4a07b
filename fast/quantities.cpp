#include "fast/quantities.hpp"

#include <algorithm>
#include <cmath>
#include <optional>

#include "fast/capacity.hpp"
#include "fast/numbers.hpp"

namespace heraldgauge::fast {
namespace {

using model::Quantity;
using model::QuantityKind;

constexpr double library_error = 4 * half_ulp;  // of log, log1p: two units in the last place, taken twice

// Binary entropy and a bound on its error. For an argument within delta of x the entropy moves by at most delta times
// its steepest slope in between.
Amount binary_entropy(const Amount& x) {
  const double p = std::min(std::max(x.value, 0.0), 1.0);
  if (p == 0 || p == 1) return {0, x.error, x.tail};
  const double value = -(p * std::log(p) + (1 - p) * std::log1p(-p)) / std::log(2.0);
  const double all = x.error + x.tail;
  const double low = std::max(p - all, 0x1p-1000);
  const double high = std::min(p + all, 1 - half_ulp);
  const double slope = std::max(std::fabs(std::log2((1 - low) / low)), std::fabs(std::log2((1 - high) / high)));
  return {value, slope * x.error * 1.01 + 4 * library_error * value, slope * x.tail * 1.01};
}

class Former {
 public:
  Former(const model::Chain& chain, const Sums& sums) : chain_(chain), sums_(sums) {
    gain_ = both_ends_click(sums.rectilinear);
  }

  Value form(const Quantity& quantity) {
    if (is_capacity(quantity.kind)) {
      if (!bottlenecks_) bottlenecks_ = bottlenecks_of(chain_);
      return capacity(*bottlenecks_, quantity);
    }
    if (quantity.kind == QuantityKind::pattern_probability) {  // pattern_value.hpp gives it where there is a pattern
      return {quantity, Status::declined, "no pattern is given", {}, 0};
    }
    const bool no_stations = chain_.stations.empty();
    switch (quantity.kind) {
      case QuantityKind::herald_probability:
        return no_stations ? exact(quantity, 1) : value(quantity, sums_.herald, sums_.exponent);
      case QuantityKind::trials_per_herald:
        if (no_stations) return exact(quantity, 1);
        if (sums_.herald.is_zero()) return undefined(quantity, no_herald);
        return value(quantity, ratio({1, 0, 0}, sums_.herald), -sums_.exponent);
      default:
        break;
    }
    if (sums_.herald.is_zero()) return undefined(quantity, no_herald);
    return conditional(quantity);
  }

  double tail_share() const { return tail_share_; }

 private:
  static constexpr const char* no_herald = "herald_probability is zero: no herald can occur";
  static constexpr const char* no_gain = "gain is zero: the ends never both click";

  // Given the herald.
  Value conditional(const Quantity& quantity) {
    switch (quantity.kind) {
      case QuantityKind::end_pattern:
        return value(quantity, given_herald(sums_.analyser[static_cast<std::size_t>(quantity.outcome)]), 0);
      case QuantityKind::gain:
        return value(quantity, given_herald(gain_), 0);
      case QuantityKind::visibility:
      case QuantityKind::visibility_deficit:
        if (!sums_.visibility.defined) return undefined(quantity, "the largest coincidence probability is zero");
        return value(quantity,
                     quantity.kind == QuantityKind::visibility ? sums_.visibility.visibility : sums_.visibility.deficit,
                     0);
      default:
        break;
    }
    if (gain_.is_zero()) return undefined(quantity, no_gain);
    switch (quantity.kind) {
      case QuantityKind::qber_rectilinear:
        return value(quantity, rectilinear_error(), 0);
      case QuantityKind::qber_diagonal:
        return value(quantity, diagonal_error(), 0);
      default:
        return key(quantity);
    }
  }

  Amount given_herald(const Amount& joint) const {
    // Without stations nothing is conditional: the herald is certain, exactly.
    if (!chain_.stations.empty()) return ratio(joint, sums_.herald);
    const double scale = std::ldexp(1.0, static_cast<int>(sums_.exponent));
    return {joint.value * scale, joint.error * scale, joint.tail * scale};
  }

  static Amount both_ends_click(const std::array<Amount, 16>& table) {
    Amount sum;
    for (std::size_t l = 1; l < 4; ++l) {
      for (std::size_t r = 1; r < 4; ++r) sum = sum + table[4 * l + r];
    }
    return sum;
  }

  // Bits from the table of outcomes 1 = cross, 2 = plus, 3 = both; a double click is drawn evenly.
  Amount rectilinear_error() const {
    const auto& table = sums_.rectilinear;
    Amount drawn = table[4 * 1 + 3] + table[4 * 2 + 3] + table[4 * 3 + 1] + table[4 * 3 + 2] + table[4 * 3 + 3];
    const bool agree = chain_.station_count() % 2 == 0;
    const Amount wrong = agree ? table[4 * 1 + 2] + table[4 * 2 + 1] : table[4 * 1 + 1] + table[4 * 2 + 2];
    return ratio(wrong + 0.5 * drawn, gain_);
  }

  Amount diagonal_error() const {
    if (chain_.stations.empty()) return rectilinear_error();
    const Amount wrong = sums_.diagonal[1] + sums_.diagonal[2];
    return ratio(wrong, wrong + sums_.diagonal[0] + sums_.diagonal[3]);
  }

  // What is left of a sifted bit: 1 - f h(e_rectilinear) - h(e_diagonal), where not negative.
  Amount left_of_a_bit() const {
    const Amount first = binary_entropy(rectilinear_error());
    const Amount second = binary_entropy(diagonal_error());
    const double f = rounded(chain_.protocol.error_correction_factor).hi;
    return {1 - f * first.value - second.value,
            f * first.error + second.error + 4 * half_ulp * (1 + f * first.value + second.value),
            f * first.tail + second.tail};
  }

  // key_fraction and key_rate: the bound is relative to gain * sifting where that is the larger.
  Value key(const Quantity& quantity) {
    if (!left_of_a_bit_) left_of_a_bit_ = left_of_a_bit();
    const auto& [left, error, tail] = *left_of_a_bit_;
    note_tail(tail);
    Value result = exact(quantity, 0);
    if (left <= -(error + tail)) return result;
    const double sifting = rounded(chain_.protocol.sifting).hi;
    const bool rate = quantity.kind == QuantityKind::key_rate && !chain_.stations.empty();
    const Amount scale = rate ? gain_ : given_herald(gain_);
    result.value = scaled(scale.value * sifting * std::max(left, 0.0), rate ? sums_.exponent : 0);
    result.relative_error_bound = (error + tail + std::fabs(left) * (scale.relative() + 4 * half_ulp)) * 1.001;
    return result;
  }

  static Value exact(const Quantity& quantity, double x) { return {quantity, Status::computed, "", scaled(x, 0), 0}; }
  static Value undefined(const Quantity& quantity, const char* reason) {
    return {quantity, Status::undefined, reason, {}, 0};
  }

  Value value(const Quantity& quantity, const Amount& amount, long exponent) {
    if (amount.is_zero()) return exact(quantity, 0);
    note_tail(amount.tail / std::fabs(amount.value));
    return {quantity, Status::computed, "", scaled(amount.value, exponent), amount.relative()};
  }

  void note_tail(double share) { tail_share_ = std::max(tail_share_, share); }

  const model::Chain& chain_;
  const Sums& sums_;
  Amount gain_;
  std::optional<Bottlenecks> bottlenecks_;
  std::optional<Amount> left_of_a_bit_;
  double tail_share_ = 0;
};

}  // namespace

Scaled scaled(double x, long exponent) {
  int own = 0;
  const double significand = std::frexp(x, &own);
  return {significand, significand == 0 ? 0 : own + exponent};
}

double form_values(const model::Chain& chain, const Sums& sums, const std::vector<Quantity>& quantities,
                   std::span<Value> values) {
  Former former(chain, sums);
  for (std::size_t i = 0; i < quantities.size(); ++i) values[i] = former.form(quantities[i]);
  return former.tail_share();
}

}  // namespace heraldgauge::fast
