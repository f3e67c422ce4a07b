#pragma once
// w(n, n'): a bound on the probability that a place answers as asked, given the pair numbers of the sources on both
// sides of it, whatever the state of those photons. BOUNDS.md proves it.
//
// Summed over all accepted patterns and all photon orders q = (q_j), one a detector, of sum t: D_t is the dark
// probability that completes the pattern, D'_t the same times prod_j eta_j^{q_j}, eta_j the registering probabilities.
// With T, T' the transmittances of the two arms,
//   w = min(1, sum_t min(D_t, D'_t e_t)),  e_t = sum_i C(n, i) C(n', t-i) T^i T'^(t-i).

#include <vector>

#include "reference/pair_number/dark_weights.hpp"
#include "reference/pair_number/heralded_chain.hpp"
#include "reference/pair_number/matrix.hpp"

namespace heraldgauge::reference::pair_number {

class PlaceBound {
 public:
  PlaceBound(const StationPlace& station, Precision bits);
  // An end has no second source: n' = 0.
  PlaceBound(const EndPlace& end, const EndAsk& ask, Precision bits);

  // r, the largest number of photon events that any accepted pattern needs.
  long order() const { return static_cast<long>(dark_.size()) - 1; }
  // w for n <= first_last, n' <= second_last.
  Matrix table(long first_last, long second_last) const;

 private:
  void add_pattern(const DetectorGroup& group);
  // C(n, i) T^i, n = 0..last, i = 0..r.
  Matrix thinned(const Interval& transmittance, long last) const;

  Precision bits_;
  std::vector<Interval> dark_;         // D_t
  std::vector<Interval> registering_;  // D'_t
  Interval first_transmittance_, second_transmittance_;
};

// The bounds of all stations in order; that of a station like the one before it is not worked out again.
std::vector<PlaceBound> station_bounds(const HeraldedChain& link, Precision bits);
// The same between those of the left and the right end.
std::vector<PlaceBound> all_places(const HeraldedChain& link, const EndAsk& left, const EndAsk& right, Precision bits);

}  // namespace heraldgauge::reference::pair_number
