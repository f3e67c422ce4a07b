// One source whose pairs do not know of each other: each is the Bell state phi+ in modes of its own, their number
// Poissonian of mean 2 mu (the limit of many temporal modes).
//
// A pair leaves the silent sets S at both ends silent with x = 1/2 tr(X_A X_B), X = 1 - K a matrix of each end, so
//   G(S) = g(S) exp(-2 mu (1 - x)),  x = c c' + h h' cos 2(th_R - th_L),
// c and h the centre and half difference of an end block.

#include "compare/fock/route.hpp"
#include "compare/fock/weights.hpp"
#include "compare/formula.hpp"
#include "compare/other_chain.hpp"
#include "reference/determinant/end_block.hpp"
#include "reference/determinant/joint.hpp"

namespace heraldgauge::compare {
namespace {

using model::Chain;
using model::Quantity;
using model::QuantityKind;
using reference::Accuracy;
using reference::Basis;
using reference::Bounded;
using reference::EndTable;
using reference::Interval;

// Joint clicks when the analysers differ by an angle of this cosine of its double.
EndTable<Interval> table(const Chain& chain, const Interval& cosine, reference::Precision bits) {
  const reference::Field<Interval> field{bits};
  const Interval mean = field(fock::mean_pairs(chain.sources.front()));
  const auto silent = [&](unsigned l, unsigned r) {
    const auto a = end_block(field, chain.left_end, chain.left_arms.front(), l);
    const auto b = end_block(field, chain.right_end, chain.right_arms.back(), r);
    const Interval x = a.centre * b.centre + a.half_difference * b.half_difference * cosine;
    return a.dark * b.dark * exponential(mean * (x - field(1L)));
  };
  const auto row = [&](unsigned l) { return std::array{silent(l, 0), silent(l, 1), silent(l, 2), silent(l, 3)}; };
  return {reference::exact_clicks(std::array{row(0), row(1), row(2), row(3)})};
}

class DistinguishableRoute : public reference::Route {
 public:
  explicit DistinguishableRoute(const Chain& chain) : chain_(chain) {}
  std::string name() const override { return "closed-form"; }
  Bounded<Interval> herald(const Accuracy& accuracy) const override {
    return {Interval(1L, accuracy.bits), {}, Interval(accuracy.bits)};
  }
  Bounded<EndTable<Interval>> ends(Basis basis, const Accuracy& accuracy) const override {
    const auto angles = reference::angles_of(chain_, basis);
    const Interval cosine = reference::cosine_of_degrees(2 * (angles.right_deg - angles.left_deg), accuracy.bits);
    return {table(chain_, cosine, accuracy.bits), {}, Interval(accuracy.bits)};
  }
  Bounded<Interval> pattern(const model::Pattern&, const Accuracy& accuracy) const override {
    return {Interval(1L, accuracy.bits) / Interval(0L, accuracy.bits), {}, Interval(accuracy.bits)};
  }
  reference::AngularProfile profile(const Accuracy& accuracy) const override {
    const Interval nothing = Interval(1L, accuracy.bits) / Interval(0L, accuracy.bits), zero(accuracy.bits);
    return {{nothing}, {zero}, {zero, zero, zero}, zero, {}};
  }

 private:
  Chain chain_;
};

bool has_alike_ends(const Chain& chain) {
  return chain.left_end.detectors[0] == chain.left_end.detectors[1] &&
         chain.right_end.detectors[0] == chain.right_end.detectors[1];
}

// With alike detectors only the sets in which plus may click depend on the angle, and the coincidence rises with the
// cosine.
CertifiedValue visibility(const Chain& chain, const Quantity& quantity, reference::Precision bits) {
  const std::size_t plus_only = 2;
  const Interval largest = table(chain, Interval(1L, bits), bits).joint[plus_only][plus_only];
  const Interval smallest = table(chain, Interval(-1L, bits), bits).joint[plus_only][plus_only];
  const Interval sum = largest + smallest;
  const bool deficit = quantity.kind == QuantityKind::visibility_deficit;
  const Interval value = (deficit ? smallest * 2L : Interval(largest - smallest)) / sum;
  if (!value.is_bounded()) return {quantity, fast::Status::undefined, "no coincidence is possible", std::nullopt};
  return {quantity, fast::Status::computed, "", reference::Enclosure{value.lower(), value.upper()}};
}

std::optional<std::string> not_served(const Chain& chain) {
  if (chain.station_count() != 0) return "a chain with stations";
  for (const model::End* end : {&chain.left_end, &chain.right_end}) {
    for (const model::Detector& detector : end->detectors) {
      if (detector.kind == model::DetectorKind::resolving) return "a number-resolving detector";
    }
  }
  return std::nullopt;
}

}  // namespace

Departure distinguishable_pairs() {
  Departure departure;
  departure.id = "distinguishable-pairs";
  departure.sentence = "Pairs of one source are independent of each other and Poissonian in number (no stations).";
  departure.replaces = "1/det(1 - lam X_A X_B) by exp(-2 mu (1 - tr(X_A X_B)/2))";
  departure.claimed = "pulses much longer than the coherence time";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  departure.enclose = [](const Case& point, const std::vector<Quantity>& quantities, const Setting&, int digits) {
    if (const auto reason = not_served(point.chain)) return declined_certified(quantities, *reason);
    std::vector<CertifiedValue> values;
    const auto make = [&] { return std::make_unique<DistinguishableRoute>(point.chain); };
    for (const Quantity& quantity : quantities) {
      const bool of_visibility = touches_visibility(quantity);
      if (quantity.kind == QuantityKind::pattern_probability || (of_visibility && !has_alike_ends(point.chain))) {
        values.push_back({quantity, fast::Status::declined, "not served by the closed form", std::nullopt});
      } else if (of_visibility) {
        values.push_back(visibility(point.chain, quantity, static_cast<reference::Precision>(4 * digits + 256)));
      } else {
        values.push_back(fock::certified_by(make, point, {quantity}, digits).front());
      }
    }
    return values;
  };
  return rounding_its_enclosures(std::move(departure));
}

}  // namespace heraldgauge::compare
