#pragma once
// What a certified route computes: probabilities, per trial, of a herald together with what the ends see, as intervals
// that contain the exact value. Two routes exist, the determinant (determinant/) and the pair number (pair_number/);
// the quantities (quantities.hpp) are formed from either.

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::reference {

// How hard to work: the precision of every interval, and, where something is cut off, the tail that may be left out as
// log2 of an absolute probability.
struct Accuracy {
  Precision bits;
  double log2_tail;
};

// At which analyser angles the ends look, and how the correction after m psi- outcomes is made (model: the right angle
// th -> -th when m is odd; for the diagonal error rate the recorded bits are exchanged instead).
enum class Basis {
  analyser,     // the chain's own angles, right angle corrected
  rectilinear,  // 0 and 0 degrees, where the correction changes nothing
  diagonal,     // 45 and 45 degrees; for odd m the table has the bits recorded at the right end exchanged
};

// Joint probability of the herald and of exactly these clicks at the ends: joint[left][right], each index 2*plus +
// cross.
template <class Number>
struct EndTable {
  std::array<std::array<Number, 4>, 4> joint;
  friend bool operator==(const EndTable&, const EndTable&) = default;
};

// A value and what was left out of it: the pairs kept per source (empty: nothing cut off) and an upper bound on the
// tail, which the value's upper end already includes.
template <class Value>
struct Bounded {
  Value value;
  std::vector<long> cutoff;
  Interval tail;
};

// The joint probability of the herald, left plus and right plus clicking and both cross detectors silent, as a function
// of phi = 2 * right analyser angle in radians (for N = 0: 2 * (right - left)), corrected as in Basis::analyser:
//
//   P(phi) = sum_{q=0..Q} ( cosine[q] cos q phi + sine[q] sin q phi ) + r(phi) + e(phi)
//
// with |r|, |r'|, |r''| <= remainder[0], [1], [2] for every phi, and 0 <= e(phi) <= tail. sine[0] is 0.
struct AngularProfile {
  std::vector<Interval> cosine;
  std::vector<Interval> sine;
  std::array<Interval, 3> remainder;
  Interval tail;
  std::vector<long> cutoff;  // as in Bounded
};

class Route {
 public:
  virtual ~Route() = default;
  virtual std::string name() const = 0;
  virtual Bounded<Interval> herald(const Accuracy& accuracy) const = 0;
  virtual Bounded<EndTable<Interval>> ends(Basis basis, const Accuracy& accuracy) const = 0;
  virtual Bounded<Interval> pattern(const model::Pattern& pattern, const Accuracy& accuracy) const = 0;
  virtual AngularProfile profile(const Accuracy& accuracy) const = 0;
};

}  // namespace heraldgauge::reference
