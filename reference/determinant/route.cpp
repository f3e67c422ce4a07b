#include "reference/determinant/route.hpp"

#include <algorithm>

#include "reference/determinant/joint.hpp"
#include "reference/determinant/profile.hpp"
#include "reference/determinant/station_terms.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;

template <std::size_t Count>
bool any_resolving(const std::array<model::Detector, Count>& detectors) {
  return std::any_of(detectors.begin(), detectors.end(),
                     [](const model::Detector& detector) { return detector.kind == model::DetectorKind::resolving; });
}

Interval as_probability(const Interval& x) { return x.is_bounded() ? restricted(x, 0, 1) : x; }

class DeterminantRoute final : public Route {
 public:
  explicit DeterminantRoute(const Chain& chain) : chain_(chain) {}

  std::string name() const override { return "determinant"; }

  Bounded<Interval> herald(const Accuracy& accuracy) const override {
    return uncut(as_probability(herald_probability(Field<Interval>{accuracy.bits}, chain_)), accuracy);
  }
  Bounded<EndTable<Interval>> ends(Basis basis, const Accuracy& accuracy) const override {
    EndTable<Interval> table = joint_table(Field<Interval>{accuracy.bits}, chain_, basis);
    for (auto& row : table.joint) {
      for (Interval& probability : row) probability = as_probability(probability);
    }
    return uncut(table, accuracy);
  }
  Bounded<Interval> pattern(const model::Pattern& pattern, const Accuracy& accuracy) const override {
    return uncut(as_probability(pattern_probability(Field<Interval>{accuracy.bits}, chain_, pattern)), accuracy);
  }
  AngularProfile profile(const Accuracy& accuracy) const override { return determinant_profile(chain_, accuracy.bits); }

 private:
  template <class Value>
  static Bounded<Value> uncut(Value value, const Accuracy& accuracy) {
    return {std::move(value), {}, Interval(accuracy.bits)};
  }
  Chain chain_;
};

}  // namespace

std::unique_ptr<Route> make_determinant_route(const Chain& chain) { return std::make_unique<DeterminantRoute>(chain); }

std::optional<std::string> determinant_refusal(const Chain& chain) {
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    if (chain.sources[k].kind != model::SourceKind::squeezed)
      return "an ideal-pair source (source " + std::to_string(k) + ")";
  }
  for (std::size_t k = 0; k < chain.station_count(); ++k) {
    if (any_resolving(chain.stations[k].detectors)) {
      return "a number-resolving detector (station " + std::to_string(k + 1) + ")";
    }
  }
  if (any_resolving(chain.left_end.detectors)) return "a number-resolving detector (left end)";
  if (any_resolving(chain.right_end.detectors)) return "a number-resolving detector (right end)";
  return std::nullopt;
}

double determinant_terms(const Chain& chain) {
  double terms = 1;
  for (const model::Station& station : chain.stations) {
    terms *= static_cast<double>(count_station_terms(station, weighted_outcomes(station.herald, HeraldSum::corrected)));
  }
  return terms;
}

}  // namespace heraldgauge::reference
