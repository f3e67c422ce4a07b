#include "compare/formula.hpp"

#include <mpfr.h>

#include <algorithm>

#include "compare/other_chain.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::Rational;
using reference::Interval;
using reference::Precision;

constexpr Precision bits_over_binary64 = 128;
constexpr int digits_of_binary64 = 18;

class Terms64 : public Terms {
 public:
  explicit Terms64(const Evaluator& inner) : Terms(bits_over_binary64), inner_(inner) {}

 protected:
  std::vector<Term> ask(const Case& point, const std::vector<Quantity>& quantities) override {
    std::vector<Term> terms;
    for (const Value& value : inner_(point, quantities)) {
      Term term{value.status, value.reason, std::nullopt};
      if (value.status == fast::Status::computed) term.value = Interval(exactly(value.value), bits());
      terms.push_back(std::move(term));
    }
    return terms;
  }

 private:
  const Evaluator& inner_;
};

class CertifiedTerms : public Terms {
 public:
  CertifiedTerms(const CertifiedEvaluator& inner, int digits)
      : Terms(static_cast<Precision>(4 * digits + 96)), inner_(inner), digits_(digits) {}

 protected:
  std::vector<Term> ask(const Case& point, const std::vector<Quantity>& quantities) override {
    std::vector<Term> terms;
    for (const CertifiedValue& value : inner_(point, quantities, digits_ + 3)) {
      Term term{value.status, value.reason, std::nullopt};
      if (value.enclosure) term.value = Interval(value.enclosure->lower, value.enclosure->upper, bits());
      terms.push_back(std::move(term));
    }
    return terms;
  }

 private:
  const CertifiedEvaluator& inner_;
  int digits_;
};

Value rounded(const CertifiedValue& value) {
  Value result{value.quantity, value.status, value.reason, {}, ""};
  if (value.enclosure) result.value = scaled(Rational((value.enclosure->lower + value.enclosure->upper) / 2));
  return result;
}

CertifiedValue as_value(const Quantity& quantity, const Term& term) {
  CertifiedValue value{quantity, term.status, term.reason, std::nullopt};
  if (!term.value) return value;
  if (!term.value->is_bounded())
    return {quantity, fast::Status::declined, "no bounded value was reached", std::nullopt};
  value.enclosure = reference::Enclosure{term.value->lower(), term.value->upper()};
  return value;
}

}  // namespace

Term computed(const Interval& value) { return {fast::Status::computed, "", value}; }
Term declined_term(const std::string& reason) { return {fast::Status::declined, reason, std::nullopt}; }

Terms::Known& Terms::known(const Case& point) {
  for (Known& known : known_) {
    if (known.point.chain == point.chain) return known;
  }
  known_.push_back({point, {}});
  return known_.back();
}

void Terms::prepare(const Case& point, const std::vector<Quantity>& quantities) {
  Known& known = this->known(point);
  std::vector<Quantity> missing;
  for (const Quantity& quantity : quantities) {
    const bool present =
        std::any_of(known.terms.begin(), known.terms.end(), [&](const auto& entry) { return entry.first == quantity; });
    if (!present) missing.push_back(quantity);
  }
  if (missing.empty()) return;
  std::vector<Term> terms = ask(point, missing);
  for (std::size_t i = 0; i < missing.size(); ++i) known.terms.emplace_back(missing[i], std::move(terms[i]));
}

Term Terms::at(const Case& point, const Quantity& quantity) {
  prepare(point, {quantity});
  for (const auto& [known_quantity, term] : known(point).terms) {
    if (known_quantity == quantity) return term;
  }
  return declined_term("the quantity is not served");
}

std::optional<Term> first_missing(std::initializer_list<const Term*> terms) {
  for (const Term* term : terms) {
    if (!term->value) return *term;
  }
  return std::nullopt;
}

Departure by_formula(Departure departure, const Formula& formula) {
  departure.rework = [formula](const Case& point, const std::vector<Quantity>& quantities, const Evaluator& inner) {
    Terms64 terms(inner);
    std::vector<Value> values;
    for (const Quantity& quantity : quantities) {
      values.push_back(rounded(as_value(quantity, formula(point, quantity, terms))));
    }
    return values;
  };
  departure.certified_rework = [formula](const Case& point, const std::vector<Quantity>& quantities,
                                         const CertifiedEvaluator& inner, int digits) {
    CertifiedTerms terms(inner, digits);
    std::vector<CertifiedValue> values;
    for (const Quantity& quantity : quantities) values.push_back(as_value(quantity, formula(point, quantity, terms)));
    return values;
  };
  const auto rework = departure.rework;
  const auto certified_rework = departure.certified_rework;
  departure.evaluate = [rework](const Case& point, const std::vector<Quantity>& quantities, const Setting&) {
    return rework(point, quantities, values_of);
  };
  departure.enclose = [certified_rework](const Case& point, const std::vector<Quantity>& quantities, const Setting&,
                                         int digits) {
    return certified_rework(point, quantities, certified_values_of, digits);
  };
  return departure;
}

Departure rounding_its_enclosures(Departure departure) {
  const auto enclose = departure.enclose;
  departure.evaluate = [enclose](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    std::vector<Value> values;
    for (const CertifiedValue& value : enclose(point, quantities, setting, digits_of_binary64)) {
      values.push_back(rounded(value));
    }
    return values;
  };
  return departure;
}

Rational exactly(const fast::Scaled& value) {
  Rational x(value.significand);
  if (value.exponent >= 0) {
    mpq_mul_2exp(x.get_mpq_t(), x.get_mpq_t(), static_cast<mp_bitcnt_t>(value.exponent));
  } else {
    mpq_div_2exp(x.get_mpq_t(), x.get_mpq_t(), static_cast<mp_bitcnt_t>(-value.exponent));
  }
  return x;
}

fast::Scaled scaled(const Rational& x) {
  if (x == 0) return {};
  mpfr_t rounded;
  mpfr_init2(rounded, 53);
  mpfr_set_q(rounded, x.get_mpq_t(), MPFR_RNDN);
  long exponent = 0;
  const double significand = mpfr_get_d_2exp(&exponent, rounded, MPFR_RNDN);
  mpfr_clear(rounded);
  return {significand, exponent};
}

}  // namespace heraldgauge::compare
