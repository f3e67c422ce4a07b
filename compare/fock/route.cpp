#include "compare/fock/route.hpp"

#include <cmath>

#include "compare/other_chain.hpp"
#include "reference/quantity_values.hpp"
#include "reference/width.hpp"

namespace heraldgauge::compare::fock {
namespace {

using model::Quantity;
using model::QuantityKind;
using reference::Accuracy;
using reference::AngularProfile;
using reference::Basis;
using reference::Bounded;
using reference::Computed;
using reference::EndTable;
using reference::IntervalTables;

constexpr int most_attempts = 5;

// kept +- tail; what is left out of a sum of probabilities is not negative, but a departure's terms may be.
Interval widened(const Interval& kept, const Interval& tail) { return kept + reference::hull(tail, -tail); }

Computed<Interval> compute(IntervalTables& tables, const Case& point, const Quantity& quantity) {
  tables.begin_value();
  switch (quantity.kind) {
    case QuantityKind::visibility:
    case QuantityKind::visibility_deficit:
      return reference::visibility_quantity(tables, quantity.kind);
    case QuantityKind::key_fraction:
    case QuantityKind::key_rate:
      return reference::key_quantity(tables, point.chain, quantity.kind, tables.accuracy().bits);
    default:
      return reference::rational_quantity(tables, point.chain, quantity, point.pattern);
  }
}

CertifiedValue as_value(const Quantity& quantity, const Computed<Interval>& computed) {
  if (!computed.value) return {quantity, fast::Status::undefined, computed.undefined, std::nullopt};
  if (!computed.value->is_bounded()) {
    return {quantity, fast::Status::declined, "no bounded enclosure was reached", std::nullopt};
  }
  return {quantity, fast::Status::computed, "", reference::Enclosure{computed.value->lower(), computed.value->upper()}};
}

class Certifier {
 public:
  Certifier(const std::function<std::unique_ptr<reference::Route>()>& make_route, const Case& point, int digits)
      : make_route_(make_route), point_(point), digits_(digits) {
    const double bits = reference::bits_per_digit * (digits + 2);
    accuracy_ = {static_cast<reference::Precision>(bits) + 80, -bits - 8};
    const double log2_herald = make_route_()->herald(accuracy_).value.log2_mignitude();
    if (std::isfinite(log2_herald)) accuracy_.log2_tail += log2_herald;
    tables_.emplace(point_.chain, make_route_(), accuracy_);
  }

  CertifiedValue certify(const Quantity& quantity) {
    if (touches_capacities(quantity)) return certified_values_of(point_, {quantity}, digits_).front();
    for (int attempt = 1;; ++attempt) {
      const auto computed = compute(*tables_, point_, quantity);
      const bool met = !computed.value || reference::is_narrow_enough(*computed.value, computed.scale, digits_);
      if (met || attempt == most_attempts) return as_value(quantity, computed);
      const auto missing = reference::missing_bits(*computed.value, computed.scale, digits_);
      const double bits = missing ? std::fmax(*missing, 0) + 12 : 64;
      if (tables_->provenance().limited_by_tail) {
        accuracy_.log2_tail -= bits;
      } else {
        accuracy_.bits += static_cast<reference::Precision>(bits);
      }
      // Tables made anew never examine zeros by rules that hold for the model alone.
      tables_.emplace(point_.chain, make_route_(), accuracy_);
    }
  }

 private:
  const std::function<std::unique_ptr<reference::Route>()>& make_route_;
  const Case& point_;
  int digits_;
  Accuracy accuracy_{};
  std::optional<IntervalTables> tables_;
};

}  // namespace

FockRoute::Prepared FockRoute::prepared(const Accuracy& accuracy) const {
  std::vector<long> cuts = recipe_.cuts(chain_, setting_, accuracy.log2_tail);
  const Interval tail = recipe_.tail ? recipe_.tail(chain_, cuts, accuracy.bits) : Interval(accuracy.bits);
  return {cuts, Chain<Interval>(Arithmetic<Interval>{accuracy.bits}, described(recipe_, chain_, setting_, cuts)), tail};
}

Bounded<Interval> FockRoute::herald(const Accuracy& accuracy) const {
  const Prepared ready = prepared(accuracy);
  const Interval kept = ready.chain.herald().front();
  return {chain_.station_count() == 0 ? kept : widened(kept, ready.tail), ready.cuts, ready.tail};
}

Bounded<EndTable<Interval>> FockRoute::ends(Basis basis, const Accuracy& accuracy) const {
  const Prepared ready = prepared(accuracy);
  EndTable<Interval> table = ready.chain.ends(basis).front();
  for (auto& row : table.joint) {
    for (Interval& entry : row) entry = widened(entry, ready.tail);
  }
  return {table, ready.cuts, ready.tail};
}

Bounded<Interval> FockRoute::pattern(const model::Pattern& pattern, const Accuracy& accuracy) const {
  const Prepared ready = prepared(accuracy);
  return {widened(ready.chain.pattern(pattern).front(), ready.tail), ready.cuts, ready.tail};
}

AngularProfile FockRoute::profile(const Accuracy& accuracy) const {
  const Prepared ready = prepared(accuracy);
  const long points = 2 * ready.cuts.back() + 1;
  std::vector<Rational> angles;
  for (long j = 0; j < points; ++j) angles.push_back(Rational(180 * j, points));
  for (Rational& angle : angles) angle.canonicalize();
  std::vector<Interval> values;
  for (const auto& by_total : ready.chain.coincidences(angles)) values.push_back(by_total.front());
  AngularProfile profile = profile_from(values);
  profile.cutoff = ready.cuts;
  // What is left out lies within +-tail: below the mean by tail, it lies in [0, 2 tail].
  profile.cosine[0] -= ready.tail;
  profile.tail = ready.tail * 2L;
  return profile;
}

AngularProfile profile_from(const std::vector<Interval>& values) {
  const auto points = static_cast<long>(values.size());
  const reference::Precision bits = values.front().precision();
  AngularProfile profile{{}, {}, {Interval(bits), Interval(bits), Interval(bits)}, Interval(bits), {}};
  for (long q = 0; q <= points / 2; ++q) {
    Interval cosine(bits), sine(bits);
    for (long j = 0; j < points; ++j) {
      Rational degrees(360 * (q * j % points), points);
      degrees.canonicalize();
      cosine += values[static_cast<std::size_t>(j)] * reference::cosine_of_degrees(degrees, bits);
      sine += values[static_cast<std::size_t>(j)] * reference::sine_of_degrees(degrees, bits);
    }
    const Interval share(Rational(q == 0 ? 1 : 2) / Rational(points), bits);
    profile.cosine.push_back(cosine * share);
    profile.sine.push_back(q == 0 ? Interval(bits) : sine * share);
  }
  return profile;
}

std::vector<CertifiedValue> certified_by(const std::function<std::unique_ptr<reference::Route>()>& make_route,
                                         const Case& point, const std::vector<Quantity>& quantities, int digits) {
  Certifier certifier(make_route, point, digits);
  std::vector<CertifiedValue> values;
  for (const Quantity& quantity : quantities) values.push_back(certifier.certify(quantity));
  return values;
}

}  // namespace heraldgauge::compare::fock
