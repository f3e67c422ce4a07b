#pragma once
// The explicit Fock evaluator as a certified route, so that the reference's formulas for the quantities apply to it.

#include "compare/fock/departure.hpp"
#include "reference/route.hpp"

namespace heraldgauge::compare::fock {

class FockRoute : public reference::Route {
 public:
  FockRoute(const model::Chain& chain, const Setting& setting, const Recipe& recipe)
      : chain_(chain), setting_(setting), recipe_(recipe) {}

  std::string name() const override { return "fock"; }
  reference::Bounded<Interval> herald(const reference::Accuracy& accuracy) const override;
  reference::Bounded<reference::EndTable<Interval>> ends(reference::Basis basis,
                                                         const reference::Accuracy& accuracy) const override;
  reference::Bounded<Interval> pattern(const model::Pattern& pattern,
                                       const reference::Accuracy& accuracy) const override;
  reference::AngularProfile profile(const reference::Accuracy& accuracy) const override;

 private:
  struct Prepared {
    std::vector<long> cuts;
    Chain<Interval> chain;
    Interval tail;
  };
  Prepared prepared(const reference::Accuracy& accuracy) const;

  model::Chain chain_;
  Setting setting_;
  Recipe recipe_;
};

// Certified values of one quantity each by any route, the accuracy raised until the width is met or it is hopeless.
std::vector<CertifiedValue> certified_by(const std::function<std::unique_ptr<reference::Route>()>& make_route,
                                         const Case& point, const std::vector<model::Quantity>& quantities, int digits);

// The harmonics q = 0..Q of a function of phi from its values at phi_j = 2 pi j/(2Q+1): exact for a Fourier sum of that
// degree.
reference::AngularProfile profile_from(const std::vector<Interval>& values);

}  // namespace heraldgauge::compare::fock
