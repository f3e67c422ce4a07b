#include "compare/departure_error.hpp"

#include <algorithm>

#include "compare/fock/departure.hpp"
#include "compare/formula.hpp"
#include "compare/other_chain.hpp"
#include "reference/arithmetic/decimal.hpp"

namespace heraldgauge::compare {
namespace {

using model::Expected;
using model::Quantity;
using model::Rational;
using reference::Enclosure;

constexpr int most_digits = 99;

Rational largest_size(const Enclosure& x) { return std::max<Rational>(abs(x.lower), abs(x.upper)); }
Rational smallest_size(const Enclosure& x) {
  if (x.lower <= 0 && x.upper >= 0) return 0;
  return std::min<Rational>(abs(x.lower), abs(x.upper));
}

// (s - e)/e over all s and e: s/e - 1 is monotone in each, so the corners bound it. Requires that e excludes 0.
Enclosure relative_error(const Enclosure& s, const Enclosure& e) {
  const Rational corners[] = {s.lower / e.lower, s.lower / e.upper, s.upper / e.lower, s.upper / e.upper};
  const auto [least, most] = std::minmax_element(std::begin(corners), std::end(corners));
  return {*least - 1, *most - 1};
}

int digits_of(const Rational& size) {
  if (size == 0) return most_digits;
  // floor(-log10 size): 10^exponent <= size < 10^(exponent+1), and exactly a power of ten counts in full.
  const long exponent = reference::decimal_exponent(size);
  model::Integer power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(std::labs(exponent)));
  const bool is_power = exponent <= 0 ? size * power == 1 : size == power;
  return static_cast<int>(std::clamp(is_power ? -exponent : -exponent - 1, 0L, static_cast<long>(most_digits)));
}

Bias bias_of(const Quantity& quantity, const Enclosure& error) {
  if (error.lower == 0 && error.upper == 0) return Bias::exact;
  const model::Sense sense = model::entry_of(quantity).sense;
  const bool high = error.lower > 0, low = error.upper < 0;
  if (sense == model::Sense::neutral || !(high || low)) return Bias::neutral;
  return high == (sense == model::Sense::more_is_better) ? Bias::optimistic : Bias::pessimistic;
}

// The departure's values as enclosures where that is certified, else as the numbers computed.
struct DepartureValue {
  CertifiedValue value;
  std::string effort;
  bool certified;
};

std::vector<DepartureValue> values_with_certificate(const Case& point, const Chosen& chosen,
                                                    const ErrorRequest& request) {
  const Departure& departure = *chosen.departure;
  std::vector<DepartureValue> values;
  if (departure.enclose) {
    for (CertifiedValue& value : departure.enclose(point, request.quantities, chosen.setting, request.digits)) {
      values.push_back({std::move(value), "", true});
    }
    return values;
  }
  for (const Value& value : departure.evaluate(point, request.quantities, chosen.setting)) {
    CertifiedValue exact{value.quantity, value.status, value.reason, std::nullopt};
    if (value.status == fast::Status::computed) exact.enclosure = Enclosure{exactly(value.value), exactly(value.value)};
    values.push_back({std::move(exact), value.effort, departure.value_is_the_machine_number});
  }
  return values;
}

void compare_with(DepartureError& error, const DepartureValue& value) {
  const Enclosure& s = *value.value.enclosure;
  error.value = (s.lower + s.upper) / 2;
  if (!error.exact) return;
  const Enclosure& e = *error.exact;
  const bool both_zero = s.lower == 0 && s.upper == 0 && e.lower == 0 && e.upper == 0;
  if (!both_zero && e.lower <= 0 && e.upper >= 0) {
    error.reason = "the exact value is 0, or not known apart from 0";
    return;
  }
  const Enclosure relative = both_zero ? Enclosure{0, 0} : relative_error(s, e);
  error.relative = (relative.lower + relative.upper) / 2;
  error.bias = bias_of(error.quantity, relative);
  error.digits_left = digits_of(largest_size(relative));
  if (value.certified) error.certified = relative;
}

}  // namespace

bool DepartureError::certainly_within(const Rational& limit) const {
  return certified && largest_size(*certified) <= limit;
}
bool DepartureError::certainly_beyond(const Rational& limit) const {
  return certified && smallest_size(*certified) > limit;
}

Expected<std::vector<CertifiedValue>> exact_values(const Case& point, const ErrorRequest& request) {
  reference::Request asked;
  asked.quantities = request.quantities;
  asked.pattern = point.pattern;
  asked.digits = request.digits + 2;
  asked.intervals_only = true;
  const auto results = reference::enclose(point.chain, asked);
  if (!results) return results.faults();
  return as_certified_values(*results);
}

std::vector<DepartureError> errors_against(const std::vector<CertifiedValue>& exact, const Case& point,
                                           const Chosen& chosen, const ErrorRequest& request) {
  const Departure& departure = *chosen.departure;
  const auto transformed = departure.transform ? departure.transform(point) : Expected<Case>(model::Fault{});
  const bool changes_nothing = transformed && transformed->chain == point.chain;
  std::vector<DepartureValue> values;
  if (!changes_nothing) values = values_with_certificate(point, chosen, request);
  std::vector<DepartureError> errors;
  for (std::size_t i = 0; i < request.quantities.size(); ++i) {
    const bool untouched = changes_nothing || !departure.touches(request.quantities[i]);
    const DepartureValue value = untouched ? DepartureValue{exact[i], "", true} : values[i];
    DepartureError error{request.quantities[i], value.value.status, value.value.reason, value.effort, {}, {}, {}, {}};
    error.exact = exact[i].enclosure;
    if (untouched && error.exact) {
      error.value = (error.exact->lower + error.exact->upper) / 2;
      error.relative = 0;
      error.certified = Enclosure{0, 0};
      error.digits_left = most_digits;
      error.bias = Bias::exact;
    } else if (value.value.enclosure) {
      compare_with(error, value);
    }
    errors.push_back(std::move(error));
  }
  return errors;
}

Expected<std::vector<DepartureError>> errors_of(const Case& point, const Chosen& chosen, const ErrorRequest& request) {
  const auto exact = exact_values(point, request);
  if (!exact) return exact.faults();
  return errors_against(*exact, point, chosen, request);
}

std::optional<Departure> combined(const Chosen& first, const Chosen& second) {
  const Departure a = *first.departure, b = *second.departure;
  const Setting setting_a = first.setting, setting_b = second.setting;
  Departure both;
  both.id = a.id + " + " + b.id;
  both.touches = [a, b](const Quantity& quantity) { return a.touches(quantity) || b.touches(quantity); };
  if (a.transform) {
    both.evaluate = [=](const Case& point, const std::vector<Quantity>& quantities, const Setting&) {
      const auto other = a.transform(point);
      return other ? b.evaluate(*other, quantities, setting_b) : declined(quantities, in_words(other.faults()));
    };
    if (b.enclose) {
      both.enclose = [=](const Case& point, const std::vector<Quantity>& quantities, const Setting&, int digits) {
        const auto other = a.transform(point);
        return other ? b.enclose(*other, quantities, setting_b, digits)
                     : declined_certified(quantities, in_words(other.faults()));
      };
    }
    both.value_is_the_machine_number = b.value_is_the_machine_number;
    return both;
  }
  if (b.rework && a.enclose) {
    both.evaluate = [=](const Case& point, const std::vector<Quantity>& quantities, const Setting&) {
      return b.rework(point, quantities, [&](const Case& same, const std::vector<Quantity>& asked) {
        return a.evaluate(same, asked, setting_a);
      });
    };
    both.enclose = [=](const Case& point, const std::vector<Quantity>& quantities, const Setting&, int digits) {
      const CertifiedEvaluator inner = [&](const Case& same, const std::vector<Quantity>& asked, int more) {
        return a.enclose(same, asked, setting_a, more);
      };
      return b.certified_rework(point, quantities, inner, digits);
    };
    return both;
  }
  if (!a.recipe || !b.recipe) return std::nullopt;
  const auto recipe = fock::both(*a.recipe, setting_a, *b.recipe, setting_b);
  return recipe ? std::optional<Departure>(fock::by_fock(both, *recipe)) : std::nullopt;
}

std::string text_of(Bias bias) {
  switch (bias) {
    case Bias::optimistic:
      return "optimistic";
    case Bias::pessimistic:
      return "pessimistic";
    case Bias::exact:
      return "exact";
    case Bias::neutral:
      break;
  }
  return "neutral";
}

}  // namespace heraldgauge::compare
