#include "reference/enclose.hpp"

#include <cmath>
#include <functional>
#include <memory>

#include "reference/arithmetic/decimal.hpp"
#include "reference/determinant/route.hpp"
#include "reference/quantity_values.hpp"
#include "reference/route_choice.hpp"
#include "reference/width.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Expected;
using model::Fault;
using model::Faults;
using model::Quantity;
using model::QuantityKind;

// Above these only on request: a sum of rationals has about as many bits as all its denominators together.
constexpr std::size_t most_stations_in_rationals = 2;
constexpr double most_bits_in_rationals = 6e4;  // terms of the sum over the stations, times the bits of all inputs
constexpr Precision first_guard_bits = 64;
constexpr double spare_bits = 12;
constexpr int most_attempts = 16;

bool is_capacity(QuantityKind kind) { return kind >= QuantityKind::capacity_point; }
bool is_key(QuantityKind kind) { return kind == QuantityKind::key_fraction || kind == QuantityKind::key_rate; }
bool is_visibility(QuantityKind kind) {
  return kind == QuantityKind::visibility || kind == QuantityKind::visibility_deficit;
}

// The angle bases that a quantity reads.
std::vector<Basis> bases_of(QuantityKind kind) {
  if (is_key(kind)) return {Basis::rectilinear, Basis::diagonal};
  if (kind == QuantityKind::qber_diagonal) return {Basis::diagonal};
  if (kind == QuantityKind::end_pattern || kind == QuantityKind::pattern_probability) return {Basis::analyser};
  return {Basis::rectilinear};
}

class Certifier {
 public:
  Certifier(const Chain& chain, const Request& request, RouteName route)
      : chain_(chain), request_(request), route_(route), irrational_(irrational_input(chain)), exact_(chain) {
    rationals_are_short_ = !request.intervals_only && chain.station_count() <= most_stations_in_rationals &&
                           determinant_terms(chain) * static_cast<double>(input_bits(chain)) <= most_bits_in_rationals;
  }

  Result certify(const Quantity& quantity) {
    if (is_capacity(quantity.kind)) return certify_capacity(quantity);
    if (in_rationals(quantity.kind)) {
      return is_key(quantity.kind) ? certify_key_of_rationals(quantity) : rational_result(quantity);
    }
    return certify_in_intervals(quantity);
  }

  // Why --exact cannot serve a quantity.
  std::optional<std::string> irrational_part(const Quantity& quantity) const {
    if (model::entry_of(quantity).irrational) return "it is not a rational function of the inputs";
    if (irrational_) return *irrational_ + " is irrational";
    for (const Basis basis : bases_of(quantity.kind)) {
      if (!has_rational_angles(chain_, basis)) return "the analyser angles have irrational cosines";
    }
    return std::nullopt;
  }

 private:
  bool in_rationals(QuantityKind kind) const {
    if (route_ != RouteName::determinant || irrational_ || is_visibility(kind)) return false;
    for (const Basis basis : bases_of(kind)) {
      if (!has_rational_angles(chain_, basis)) return false;
    }
    return request_.exact || rationals_are_short_;
  }

  Result rational_result(const Quantity& quantity) {
    const Computed<Rational> computed = rational_quantity(exact_, chain_, quantity, request_.pattern);
    Result result{quantity, Status::undefined, computed.undefined, std::nullopt, {"determinant", {}, 0, std::nullopt},
                  0};
    if (!computed.value) return result;
    result.status = Status::certified;
    result.enclosure = Enclosure{*computed.value, *computed.value};
    result.digits = digits_of_exact;
    return result;
  }

  // Raises the precision until the width is met, for a value that only needs more bits.
  Result certify_by_bits(const Quantity& quantity, const std::string& route,
                         const std::function<Computed<Interval>(Precision)>& compute) {
    Precision bits = static_cast<Precision>(bits_per_digit * request_.digits) + first_guard_bits;
    for (;; bits *= 2) {
      const Computed<Interval> computed = compute(bits);
      const bool last = bits * 2 > request_.largest_precision_bits;
      if (!computed.value || last || is_narrow_enough(*computed.value, computed.scale, request_.digits)) {
        return result_of(quantity, computed, {route, {}, 0, bits});
      }
    }
  }

  Result certify_capacity(const Quantity& quantity) {
    return certify_by_bits(quantity, "closed-form",
                           [&](Precision bits) { return capacity_quantity(chain_, quantity.kind, bits); });
  }

  Result certify_key_of_rationals(const Quantity& quantity) {
    return certify_by_bits(quantity, "determinant",
                           [&](Precision bits) { return key_quantity(exact_, chain_, quantity.kind, bits); });
  }

  Computed<Interval> compute_in_intervals(const Quantity& quantity) {
    tables_->begin_value();
    if (is_visibility(quantity.kind)) return visibility_quantity(*tables_, quantity.kind);
    if (is_key(quantity.kind)) return key_quantity(*tables_, chain_, quantity.kind, tables_->accuracy().bits);
    return rational_quantity(*tables_, chain_, quantity, request_.pattern);
  }

  Result certify_in_intervals(const Quantity& quantity) {
    if (!tables_) prepare_tables();
    for (int attempt = 1;; ++attempt) {
      const Computed<Interval> computed = compute_in_intervals(quantity);
      if (!computed.value || is_narrow_enough(*computed.value, computed.scale, request_.digits)) {
        return result_of(quantity, computed, certificate());
      }
      const Accuracy next = improved(missing_bits(*computed.value, computed.scale, request_.digits));
      if (attempt == most_attempts || !is_within_limits(next)) return result_of(quantity, computed, certificate());
      tables_->improve(next);
    }
  }

  // The herald alone is cheap and shows how much the signed sum of determinants cancels.
  void prepare_tables() {
    tables_.emplace(chain_, make_route(route_, chain_), aimed_accuracy(chain_, route_, request_.digits));
    if (chain_.station_count() == 0 || route_ != RouteName::determinant) return;
    tables_->begin_value();
    const auto missing = missing_bits(tables_->herald(), std::nullopt, request_.digits);
    if (missing && *missing > 0 && is_within_limits(improved(missing))) tables_->improve(improved(missing));
  }

  bool is_within_limits(const Accuracy& accuracy) const {
    return accuracy.bits <= request_.largest_precision_bits &&
           accuracy.log2_tail >= -static_cast<double>(request_.largest_precision_bits);
  }

  Accuracy improved(const std::optional<double>& missing) const {
    Accuracy accuracy = tables_->accuracy();
    const double bits = missing ? std::max(*missing, 0.0) + spare_bits : static_cast<double>(accuracy.bits);
    if (tables_->provenance().limited_by_tail) {
      accuracy.log2_tail -= bits;
    } else {
      accuracy.bits += static_cast<Precision>(bits);
    }
    return accuracy;
  }

  Certificate certificate() const {
    const Provenance& provenance = tables_->provenance();
    const Rational tail = provenance.tail && provenance.tail->is_bounded() ? provenance.tail->upper() : Rational(0);
    return {tables_->route().name(), provenance.cutoff, tail, tables_->accuracy().bits};
  }

  Result result_of(const Quantity& quantity, const Computed<Interval>& computed, Certificate certificate) const {
    Result result{quantity, Status::undefined, computed.undefined, std::nullopt, std::move(certificate), 0};
    if (!computed.value) return result;
    const Interval& value = *computed.value;
    if (!value.is_bounded()) {
      result.status = Status::undecided;
      result.reason = "no bounded enclosure was reached at the largest precision";
      return result;
    }
    result.enclosure = Enclosure{value.lower(), value.upper()};
    result.digits = certified_digits(value, computed.scale, request_.digits);
    const bool met = is_narrow_enough(value, computed.scale, request_.digits);
    result.status = met ? Status::certified : Status::undecided;
    if (!met) result.reason = "the asked width was not reached within the limits on precision and cut-off";
    return result;
  }

  const Chain& chain_;
  const Request& request_;
  const RouteName route_;
  const std::optional<std::string> irrational_;
  bool rationals_are_short_ = false;
  ExactTables exact_;
  std::optional<IntervalTables> tables_;
};

Fault argument_fault(const std::string& argument, const std::string& wrong, const std::string& allowed) {
  return {{argument, 0, 0, ""}, wrong, allowed};
}

Faults request_faults(const Chain& chain, const Request& request) {
  Faults faults;
  if (request.digits < 1 || request.digits > largest_digits) {
    faults.push_back(argument_fault("--digits", std::to_string(request.digits) + " digits are asked for",
                                    "1 to " + std::to_string(largest_digits)));
  }
  for (const Quantity& quantity : request.quantities) {
    if (quantity.kind != QuantityKind::pattern_probability) continue;
    if (!request.pattern) {
      faults.push_back(argument_fault("ask.pattern", "pattern_probability needs a pattern", "a pattern"));
    } else if (request.pattern->stations.size() != chain.station_count()) {
      faults.push_back(argument_fault("ask.pattern", "the pattern does not have as many stations as the chain",
                                      "one entry a station"));
    }
  }
  if (request.exact && request.route == RouteChoice::pair_number) {
    faults.push_back(
        argument_fault("--exact", "the pair-number route cuts off an infinite sum", "--route determinant"));
  }
  return faults;
}

}  // namespace

Expected<std::vector<Result>> enclose(const Chain& chain, const Request& request) {
  Faults faults = request_faults(chain, request);
  if (!faults.empty()) return faults;
  const Expected<RouteName> route = choose_route(chain, request);
  if (!route) return route.faults();

  Certifier certifier(chain, request, *route);
  for (const Quantity& quantity : request.quantities) {
    const auto irrational = request.exact ? certifier.irrational_part(quantity) : std::nullopt;
    if (irrational)
      faults.push_back(argument_fault("--exact", model::name_of(quantity) + " has no exact rational: " + *irrational,
                                      "quantities and inputs that are rational"));
  }
  if (!faults.empty()) return faults;

  std::vector<Result> results;
  for (const Quantity& quantity : request.quantities) results.push_back(certifier.certify(quantity));
  return results;
}

DecimalEnclosure decimals(const Enclosure& enclosure, int digits) {
  const int significant = digits + 2;
  const Rational middle = (enclosure.lower + enclosure.upper) / 2;
  return {decimal(middle, significant, Direction::nearest), decimal(enclosure.lower, significant, Direction::down),
          decimal(enclosure.upper, significant, Direction::up)};
}

}  // namespace heraldgauge::reference
