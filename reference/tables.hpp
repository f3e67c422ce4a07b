#pragma once
// The probabilities of one chain, computed when first asked for and kept: in intervals of a rising accuracy, or in
// exact rationals.

#include <map>
#include <memory>
#include <optional>
#include <string>

#include "reference/arithmetic/field.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/route.hpp"

namespace heraldgauge::reference {

// What went into a value: for its certificate, and to decide what to improve.
struct Provenance {
  std::vector<long> cutoff;      // the longest of the tables used
  std::optional<Interval> tail;  // the largest
  bool limited_by_tail = false;  // the tail is what makes some probability used wide
};

class IntervalTables {
 public:
  using Number = Interval;
  IntervalTables(const model::Chain& chain, std::unique_ptr<Route> route, Accuracy accuracy);

  const Route& route() const { return *route_; }
  const Accuracy& accuracy() const { return accuracy_; }
  Field<Interval> field() const { return {accuracy_.bits}; }

  // Forgets what was computed at a lower accuracy. From the second accuracy on, probabilities whose enclosure contains
  // zero are examined for being exactly zero.
  void improve(const Accuracy& accuracy);
  void begin_value() { provenance_ = {}; }
  const Provenance& provenance() const { return provenance_; }

  const Interval& herald();
  const EndTable<Interval>& ends(Basis basis);
  Interval pattern(const model::Pattern& pattern);

  // Largest and smallest value, over the right analyser angle, of the coincidence that defines the visibility.
  struct Coincidence {
    Interval spread;            // max - min, from the harmonics alone, so that it keeps its digits where it is small
    Interval smallest;          // min
    Interval sum;               // max + min
    bool touches_zero = false;  // min is exactly 0
    bool vanishes = false;      // it is certainly zero at every angle
  };
  const Coincidence& coincidence();

 private:
  template <class Value>
  void note(const Bounded<Value>& bounded, const Interval& widest);
  bool may_examine_zeros() const { return improvements_ > 0; }
  void settle_zeros(Coincidence& coincidence, double argument_of_smallest) const;

  model::Chain chain_;
  std::unique_ptr<Route> route_;
  Accuracy accuracy_;
  int improvements_ = 0;
  Provenance provenance_;
  std::optional<Bounded<Interval>> herald_;
  std::map<Basis, Bounded<EndTable<Interval>>> ends_;
  std::optional<Bounded<Coincidence>> coincidence_;
};

// Requires that the chain is rational at the angles asked for (is_rational_at) and that the determinant route serves
// it.
class ExactTables {
 public:
  using Number = Rational;
  explicit ExactTables(const model::Chain& chain) : chain_(chain) {}

  Field<Rational> field() const { return {}; }
  const Rational& herald();
  const EndTable<Rational>& ends(Basis basis);
  Rational pattern(const model::Pattern& pattern);

 private:
  model::Chain chain_;
  std::optional<Rational> herald_;
  std::map<Basis, EndTable<Rational>> ends_;
};

// The first irrational input of a chain in words ("channel transmittance 10^(-6/5) of arm 0 left"), or nothing.
std::optional<std::string> irrational_input(const model::Chain& chain);
// Whether the cosines that a basis needs are rational.
bool has_rational_angles(const model::Chain& chain, Basis basis);

}  // namespace heraldgauge::reference
