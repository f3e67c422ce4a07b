// Every probability replaced by its lowest non-vanishing power of the pair parameters, all lam scaled together: the
// terms of the smallest total number of pairs at which it does not vanish, without the factors (1-lam)^2.

#include <algorithm>
#include <map>

#include "compare/chain_edits.hpp"
#include "compare/fock/departure.hpp"
#include "compare/fock/route.hpp"
#include "compare/formula.hpp"
#include "compare/key_formula.hpp"
#include "compare/other_chain.hpp"
#include "reference/determinant/exact_zero.hpp"
#include "reference/extremes.hpp"
#include "reference/quantities.hpp"

namespace heraldgauge::compare {
namespace {

using fock::Arithmetic;
using fock::Description;
using model::Chain;
using model::Quantity;
using model::QuantityKind;
using model::Rational;
using model::Real;
using reference::Basis;
using reference::EndTable;
using reference::Interval;

constexpr long most_total = 12;

// The terms of up to `most` pairs in all. Weights lam^n (1, p/2 for an ideal pair, where p is the small parameter).
Description expansion(const Chain& chain, long most) {
  Description description;
  description.chain = chain;
  description.by_total_pairs = true;
  description.most_total = most;
  for (const model::Source& source : chain.sources) {
    const bool ideal = source.kind == model::SourceKind::ideal_pair;
    std::vector<Real> weights{Real(1)};
    for (long n = 1; n <= (ideal ? std::min(most, 1L) : most); ++n)
      weights.push_back(weights.back() * source.pair_parameter);
    if (ideal && most > 0) weights[1] = weights[1] / Real(2);
    description.weights.push_back(std::move(weights));
  }
  return description;
}

// How far to expand, one after the other until a term does not vanish: the work grows fast. Dark counts alone need no
// pair, a herald without them about one from each source.
std::vector<long> stages(const Chain& chain) {
  const auto sources = static_cast<long>(chain.sources.size());
  return {0, sources, std::min(most_total, 2 * sources + 4)};
}

bool is_multiple_of_45(const Rational& degrees) { return Rational(degrees / 45).get_den() == 1; }

// The orders at which sums vanish are told in exact rationals: no parameter strictly inside its range matters for that.
class LeadingOrders {
 public:
  explicit LeadingOrders(const Chain& chain) : chain_(reference::zero_pattern_of(chain)), stages_(stages(chain)) {}

  // The first total at which `part` of the exact tables is not zero; nothing where it is zero as far as was expanded.
  template <class Part>
  std::optional<std::size_t> first(Basis basis, Part&& part) {
    for (const long most : stages_) {
      auto found = tables_.find({basis, most});
      if (found == tables_.end()) found = tables_.emplace(std::pair(basis, most), expanded(most).ends(basis)).first;
      for (std::size_t total = 0; total < found->second.size(); ++total) {
        if (part(found->second[total]) != 0) return total;
      }
    }
    return std::nullopt;
  }
  std::optional<std::size_t> first_herald() {
    for (const long most : stages_) {
      const auto heralds = expanded(most).herald();
      for (std::size_t total = 0; total < heralds.size(); ++total) {
        if (heralds[total] != 0) return total;
      }
    }
    return std::nullopt;
  }

 private:
  fock::Chain<Rational> expanded(long most) const { return {Arithmetic<Rational>{}, expansion(chain_, most)}; }

  Chain chain_;
  std::vector<long> stages_;
  std::map<std::pair<Basis, long>, std::vector<EndTable<Rational>>> tables_;
};

class LeadingOrder {
 public:
  LeadingOrder(const Chain& chain, reference::Precision bits) : chain_(chain), bits_(bits), orders_(chain) {}

  Term value(const Quantity& quantity) {
    switch (quantity.kind) {
      case QuantityKind::herald_probability:
        return herald();
      case QuantityKind::trials_per_herald:
        return quotient(computed(Interval(1L, bits_)), herald());
      case QuantityKind::end_pattern:
        return end_pattern(quantity.outcome);
      case QuantityKind::gain:
        return quotient(both(Basis::rectilinear), herald());
      case QuantityKind::qber_rectilinear:
        return quotient(error(Basis::rectilinear, reference::rectilinear_agreement_expected(chain_)),
                        both(Basis::rectilinear));
      case QuantityKind::qber_diagonal:
        return quotient(error(Basis::diagonal, reference::diagonal_agreement_expected), both(Basis::diagonal));
      case QuantityKind::key_fraction:
      case QuantityKind::key_rate:
        return key_from({value({QuantityKind::gain}), value({QuantityKind::qber_rectilinear}),
                         value({QuantityKind::qber_diagonal}), herald()},
                        chain_.protocol, quantity.kind, Interval(1L, bits_));
      case QuantityKind::visibility:
      case QuantityKind::visibility_deficit:
        return visibility(quantity.kind == QuantityKind::visibility_deficit);
      default:
        return declined_term("a stated pattern is not expanded");
    }
  }

 private:
  static Term vanishes() {
    return {fast::Status::undefined, "every term of the expansion that was made vanishes", std::nullopt};
  }
  static Term quotient(const Term& numerator, const Term& denominator) {
    if (const auto missing = first_missing({&denominator})) return *missing;
    if (numerator.status == fast::Status::undefined) return computed(Interval(denominator.value->precision()));
    if (const auto missing = first_missing({&numerator})) return *missing;
    return computed(*numerator.value / *denominator.value);
  }

  Term herald() {
    if (chain_.station_count() == 0) return computed(Interval(1L, bits_));
    const auto order = orders_.first_herald();
    return order ? computed(expanded(static_cast<long>(*order)).herald()[*order]) : vanishes();
  }
  fock::Chain<Interval> expanded(long most) const { return {Arithmetic<Interval>{bits_}, expansion(chain_, most)}; }
  const EndTable<Interval>& table(Basis basis, std::size_t order) {
    auto found = tables_.find({basis, order});
    if (found == tables_.end()) {
      const auto by_total = expanded(static_cast<long>(order)).ends(basis);
      found = tables_.emplace(std::pair(basis, order), by_total[order]).first;
    }
    return found->second;
  }
  Term both(Basis basis) {
    const auto order = orders_.first(basis, [](const auto& exact) { return reference::both_ends_click(exact); });
    return order ? computed(reference::both_ends_click(table(basis, *order))) : vanishes();
  }
  Term error(Basis basis, bool agreement) {
    const reference::Field<Rational> rationals;
    const auto order =
        orders_.first(basis, [&](const auto& exact) { return reference::erroneous(rationals, exact, agreement); });
    if (!order) return vanishes();
    return computed(reference::erroneous(reference::Field<Interval>{bits_}, table(basis, *order), agreement));
  }
  Term end_pattern(int outcome) {
    if (!is_multiple_of_45(chain_.left_end.analyser_deg) || !is_multiple_of_45(chain_.right_end.analyser_deg)) {
      return declined_term("which orders vanish is told at multiples of 45 degrees only");
    }
    const auto l = static_cast<std::size_t>(outcome >> 2), r = static_cast<std::size_t>(outcome & 3);
    const auto order = orders_.first(Basis::analyser, [&](const auto& exact) { return exact.joint[l][r]; });
    return quotient(order ? computed(table(Basis::analyser, *order).joint[l][r]) : vanishes(), herald());
  }

  // The coincidence as a function of the right angle, at the first order at which it does not vanish everywhere.
  Term visibility(bool deficit) {
    const auto coincidences = first_coincidences();
    if (!coincidences) return vanishes();
    const auto extremes = reference::extremes_of(fock::profile_from(*coincidences));
    const Interval smallest = extremes.mean + extremes.smallest;
    const Interval sum = extremes.mean * 2L + extremes.largest + extremes.smallest;
    return computed(deficit ? smallest * 2L / sum : Interval(extremes.largest - extremes.smallest) / sum);
  }
  std::optional<std::vector<Interval>> first_coincidences() const {
    for (const long most : stages(chain_)) {
      std::vector<Rational> angles;
      for (long j = 0; j <= 2 * most; ++j) angles.push_back(Rational(180 * j) / (2 * most + 1));
      const auto by_angle = expanded(most).coincidences(angles);
      for (std::size_t order = 0; order < by_angle.front().size(); ++order) {
        std::vector<Interval> here;
        for (const auto& at_angle : by_angle) here.push_back(at_angle[order]);
        const auto vanishes_there = [](const Interval& x) { return x.is_exactly_zero(); };
        if (!std::all_of(here.begin(), here.end(), vanishes_there)) return here;
      }
    }
    return std::nullopt;
  }

  const Chain& chain_;
  reference::Precision bits_;
  LeadingOrders orders_;
  std::map<std::pair<Basis, std::size_t>, EndTable<Interval>> tables_;
};

std::optional<std::string> not_served(const Chain& chain) {
  if (chain.station_count() > 3) return "more than three stations";
  if (has_background(chain)) return "a shared background is not served";
  return std::nullopt;
}

CertifiedValue as_certified(const Quantity& quantity, const Term& term) {
  if (!term.value) return {quantity, term.status, term.reason, std::nullopt};
  if (!term.value->is_bounded())
    return {quantity, fast::Status::declined, "no bounded value was reached", std::nullopt};
  return {quantity, fast::Status::computed, "", reference::Enclosure{term.value->lower(), term.value->upper()}};
}

}  // namespace

Departure leading_order() {
  Departure departure;
  departure.id = "leading-order";
  departure.sentence =
      "Each probability is its lowest non-vanishing power of the pair parameters, dark counts as they are.";
  departure.replaces = "P by the first non-zero term of its series in a common scale of all lam";
  departure.claimed = "lam far below 1 and above all dark counts";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  departure.enclose = [](const Case& point, const std::vector<Quantity>& quantities, const Setting&, int digits) {
    if (const auto reason = not_served(point.chain)) return declined_certified(quantities, *reason);
    LeadingOrder leading(point.chain, static_cast<reference::Precision>(4 * digits + 128));
    std::vector<CertifiedValue> values;
    for (const Quantity& quantity : quantities) values.push_back(as_certified(quantity, leading.value(quantity)));
    return values;
  };
  return rounding_its_enclosures(std::move(departure));
}

}  // namespace heraldgauge::compare
