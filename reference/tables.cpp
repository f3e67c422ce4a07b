#include "reference/tables.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "reference/determinant/exact_zero.hpp"
#include "reference/determinant/joint.hpp"
#include "reference/extremes.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Real;

double log2_upper(const Interval& x) {
  const Interval zero(2);
  return hull(x, zero).log2_width();
}

// The exact multiple of 45 degrees (relative to the left analyser where there is no station) next to an angle.
Rational nearest_special_angle(const Chain& chain, double radians) {
  const long eighths = std::lround(radians * 4 / M_PI);  // phi = 2 th
  const Rational origin = chain.station_count() == 0 ? chain.left_end.analyser_deg : Rational(0);
  return origin + Rational(45, 2) * eighths;
}

const Interval& widest_of(const EndTable<Interval>& table) {
  const Interval* widest = &table.joint[0][0];
  for (const auto& row : table.joint) {
    for (const Interval& entry : row) {
      if (entry.log2_width() > widest->log2_width()) widest = &entry;
    }
  }
  return *widest;
}

}  // namespace

IntervalTables::IntervalTables(const Chain& chain, std::unique_ptr<Route> route, Accuracy accuracy)
    : chain_(chain), route_(std::move(route)), accuracy_(accuracy) {}

void IntervalTables::improve(const Accuracy& accuracy) {
  accuracy_ = accuracy;
  ++improvements_;
  herald_.reset();
  ends_.clear();
  coincidence_.reset();
}

template <class Value>
void IntervalTables::note(const Bounded<Value>& bounded, const Interval& widest) {
  if (bounded.cutoff.size() > provenance_.cutoff.size()) provenance_.cutoff = bounded.cutoff;
  for (std::size_t k = 0; k < bounded.cutoff.size(); ++k) {
    provenance_.cutoff[k] = std::max(provenance_.cutoff[k], bounded.cutoff[k]);
  }
  const double log2_tail = log2_upper(bounded.tail);
  if (!provenance_.tail || log2_tail > log2_upper(*provenance_.tail)) provenance_.tail = bounded.tail;
  const bool nothing_left_out = log2_tail == -std::numeric_limits<double>::infinity();
  if (!nothing_left_out && log2_tail >= widest.log2_width() - 1) provenance_.limited_by_tail = true;
}

const Interval& IntervalTables::herald() {
  if (!herald_) {
    herald_ = route_->herald(accuracy_);
    if (herald_->value.contains_zero() && may_examine_zeros() && is_exactly_zero_herald(chain_) == true) {
      herald_->value = Interval(accuracy_.bits);
    }
  }
  note(*herald_, herald_->value);
  return herald_->value;
}

const EndTable<Interval>& IntervalTables::ends(Basis basis) {
  auto found = ends_.find(basis);
  if (found == ends_.end()) {
    found = ends_.emplace(basis, route_->ends(basis, accuracy_)).first;
    std::optional<EndTable<bool>> zeros;
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) {
        Interval& entry = found->second.value.joint[l][r];
        if (!entry.contains_zero() || !may_examine_zeros()) continue;
        if (!zeros) zeros = exact_zeros(chain_, basis).value_or(EndTable<bool>{});
        if (zeros->joint[l][r]) entry = Interval(accuracy_.bits);
      }
    }
  }
  note(found->second, widest_of(found->second.value));
  return found->second.value;
}

Interval IntervalTables::pattern(const model::Pattern& pattern) {
  Bounded<Interval> bounded = route_->pattern(pattern, accuracy_);
  if (bounded.value.contains_zero() && may_examine_zeros() && is_exactly_zero_pattern(chain_, pattern) == true) {
    bounded.value = Interval(accuracy_.bits);
  }
  note(bounded, bounded.value);
  return bounded.value;
}

// Where the smallest coincidence cannot be told from zero, a special angle may prove that it is zero.
void IntervalTables::settle_zeros(Coincidence& coincidence, double argument_of_smallest) const {
  if (!coincidence.smallest.contains_zero()) return;
  const Rational candidate = nearest_special_angle(chain_, argument_of_smallest);
  coincidence.touches_zero = is_exactly_zero_coincidence(chain_, candidate) == true;
  coincidence.vanishes = is_zero_at_every_angle(chain_);
}

const IntervalTables::Coincidence& IntervalTables::coincidence() {
  if (!coincidence_) {
    const AngularProfile profile = route_->profile(accuracy_);
    const Extremes extremes = extremes_of(profile);
    const Interval either_way = hull(profile.tail, -profile.tail);
    Coincidence value{extremes.largest - extremes.smallest + either_way,
                      raised(extremes.mean + extremes.smallest, profile.tail),
                      raised(extremes.mean * 2L + extremes.largest + extremes.smallest, profile.tail * 2L)};
    settle_zeros(value, extremes.argument_of_smallest);
    coincidence_ = Bounded<Coincidence>{std::move(value), profile.cutoff, profile.tail};
  }
  note(*coincidence_, coincidence_->value.smallest);
  return coincidence_->value;
}

const Rational& ExactTables::herald() {
  if (!herald_) herald_ = herald_probability(field(), chain_);
  return *herald_;
}

const EndTable<Rational>& ExactTables::ends(Basis basis) {
  const auto found = ends_.find(basis);
  return found != ends_.end() ? found->second : ends_.emplace(basis, joint_table(field(), chain_, basis)).first->second;
}

Rational ExactTables::pattern(const model::Pattern& pattern) { return pattern_probability(field(), chain_, pattern); }

std::optional<std::string> irrational_input(const Chain& chain) {
  std::optional<std::string> found;
  const auto examine = [&found](const Real& x, const std::string& what) {
    if (!found && !x.is_rational()) found = what + " " + x.text();
  };
  const auto examine_detector = [&](const model::Detector& detector, const std::string& where) {
    examine(detector.efficiency, "the efficiency of a detector of " + where + ",");
    examine(detector.dark_probability, "the dark probability of a detector of " + where + ",");
  };
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    const std::string number = std::to_string(k);
    examine(chain.sources[k].pair_parameter, "the pair parameter of source " + number + ",");
    examine(chain.left_arms[k].transmittance, "the transmittance of the left arm of source " + number + ",");
    examine(chain.right_arms[k].transmittance, "the transmittance of the right arm of source " + number + ",");
  }
  for (std::size_t k = 0; k < chain.station_count(); ++k) {
    const std::string where = "station " + std::to_string(k + 1);
    examine(chain.stations[k].indistinguishability, "the indistinguishability of " + where + ",");
    examine(chain.stations[k].background.photons, "the background of " + where + ",");
    for (const auto& detector : chain.stations[k].detectors) examine_detector(detector, where);
  }
  for (const auto& [end, where] :
       {std::pair{&chain.left_end, "the left end"}, std::pair{&chain.right_end, "the right end"}}) {
    examine(end->background.photons, std::string("the background of ") + where + ",");
    for (const auto& detector : end->detectors) examine_detector(detector, where);
  }
  return found;
}

bool has_rational_angles(const Chain& chain, Basis basis) {
  return are_rational(effective_angles(chain, angles_of(chain, basis)));
}

}  // namespace heraldgauge::reference
