// Herald and end probabilities to first order in all dark probabilities.
//
// With independent dark counts a probability is affine in each d_j, so with P_j the probability when only detector j is
// dark,
//   P(0) + sum_j d_j dP/dd_j(0) = P_0 + sum_j (P_j - P_0),
// exactly: a sum of routes with integer coefficients.

#include "compare/chain_edits.hpp"
#include "compare/fock/route.hpp"
#include "compare/formula.hpp"
#include "compare/other_chain.hpp"
#include "reference/determinant/route.hpp"

namespace heraldgauge::compare {
namespace {

using model::Chain;
using reference::Accuracy;
using reference::AngularProfile;
using reference::Basis;
using reference::Bounded;
using reference::EndTable;
using reference::Interval;

class SumRoute : public reference::Route {
 public:
  void add(long coefficient, const Chain& chain) {
    terms_.push_back({coefficient, reference::make_determinant_route(chain)});
  }

  std::string name() const override { return "determinant"; }
  Bounded<Interval> herald(const Accuracy& accuracy) const override {
    Interval sum(accuracy.bits);
    for (const Term& term : terms_) sum += term.route->herald(accuracy).value * term.coefficient;
    return {sum, {}, Interval(accuracy.bits)};
  }
  Bounded<Interval> pattern(const model::Pattern& pattern, const Accuracy& accuracy) const override {
    Interval sum(accuracy.bits);
    for (const Term& term : terms_) sum += term.route->pattern(pattern, accuracy).value * term.coefficient;
    return {sum, {}, Interval(accuracy.bits)};
  }
  Bounded<EndTable<Interval>> ends(Basis basis, const Accuracy& accuracy) const override {
    Bounded<EndTable<Interval>> sum = terms_.front().route->ends(basis, accuracy);
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) sum.value.joint[l][r] *= Interval(terms_.front().coefficient, accuracy.bits);
    }
    for (std::size_t i = 1; i < terms_.size(); ++i) {
      const EndTable<Interval> table = terms_[i].route->ends(basis, accuracy).value;
      for (std::size_t l = 0; l < 4; ++l) {
        for (std::size_t r = 0; r < 4; ++r) sum.value.joint[l][r] += table.joint[l][r] * terms_[i].coefficient;
      }
    }
    return sum;
  }
  AngularProfile profile(const Accuracy& accuracy) const override {
    const Interval zero(accuracy.bits);
    AngularProfile sum{{}, {}, {zero, zero, zero}, zero, {}};
    for (const Term& term : terms_) add_profile(sum, term.route->profile(accuracy), term.coefficient);
    return sum;
  }

 private:
  struct Term {
    long coefficient;
    std::unique_ptr<reference::Route> route;
  };
  static void add_profile(AngularProfile& sum, const AngularProfile& part, long coefficient) {
    const Interval zero(part.cosine.front().precision());
    while (sum.cosine.size() < part.cosine.size()) {
      sum.cosine.push_back(zero);
      sum.sine.push_back(zero);
    }
    for (std::size_t q = 0; q < part.cosine.size(); ++q) {
      sum.cosine[q] += part.cosine[q] * coefficient;
      sum.sine[q] += part.sine[q] * coefficient;
    }
    for (std::size_t i = 0; i < 3; ++i) sum.remainder[i] += part.remainder[i] * std::abs(coefficient);
  }

  std::vector<Term> terms_;
};

Chain without_dark_counts(const Chain& chain) {
  Chain quiet = chain;
  for_each_detector(quiet, [](model::Detector& detector) { detector.dark_probability = 0; });
  return quiet;
}

std::unique_ptr<reference::Route> first_order(const Chain& chain) {
  const Chain quiet = without_dark_counts(chain);
  std::vector<model::Real> darks;
  Chain copy = chain;
  for_each_detector(copy, [&](const model::Detector& detector) { darks.push_back(detector.dark_probability); });
  auto sum = std::make_unique<SumRoute>();
  const auto dark = [&](std::size_t wanted) {
    Chain one = quiet;
    std::size_t j = 0;
    for_each_detector(one, [&](model::Detector& detector) {
      if (j++ == wanted) detector.dark_probability = darks[wanted];
    });
    return one;
  };
  long counted = 0;
  for (const model::Real& d : darks) counted += d.is_zero() ? 0 : 1;
  sum->add(1 - counted, quiet);
  for (std::size_t j = 0; j < darks.size(); ++j) {
    if (!darks[j].is_zero()) sum->add(1, dark(j));
  }
  return sum;
}

std::optional<std::string> not_served(const Chain& chain) {
  if (const auto refusal = reference::determinant_refusal(chain)) return *refusal;
  if (chain.station_count() > 4) return "more than four stations";
  std::optional<std::string> reason;
  Chain copy = chain;
  for_each_detector(copy, [&](const model::Detector& detector) {
    if (detector.dark_model == model::DarkModel::thermal && !detector.dark_probability.is_zero()) {
      reason = "thermal noise also lowers the efficiency, which is not affine in d";
    }
  });
  return reason;
}

}  // namespace

Departure linear_dark() {
  Departure departure;
  departure.id = "linear-dark";
  departure.sentence = "Herald and end probabilities are expanded to first order in all dark probabilities.";
  departure.replaces = "P(d) by P(0) + sum_j d_j dP/dd_j(0)";
  departure.claimed = "d far below the probability of a photon click";
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  departure.enclose = [](const Case& point, const std::vector<model::Quantity>& quantities, const Setting&,
                         int digits) {
    if (const auto reason = not_served(point.chain)) return declined_certified(quantities, *reason);
    return fock::certified_by([&] { return first_order(point.chain); }, point, quantities, digits);
  };
  return rounding_its_enclosures(std::move(departure));
}

}  // namespace heraldgauge::compare
