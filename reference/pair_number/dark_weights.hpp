#pragma once
// How a question to a detector splits between photons and dark events. A detector that must click does so by at least
// one photon, or by none and a dark event; one that must count m registers r <= m photons and m - r dark events. So the
// operator of a place is a sum over photon orders q (one a detector) of a dark probability times a photon operator,
// every term >= 0.

#include <array>
#include <vector>

#include "reference/arithmetic/interval.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/pair_number/count_algebra.hpp"

namespace heraldgauge::reference::pair_number {

// The detectors of a place, or some of them, with the background that they share with `place_detectors` in all.
struct DetectorGroup {
  std::vector<model::Detector> detectors;
  std::vector<model::Ask> asks;  // one a detector
  model::Background background;
  long place_detectors;  // F: 4 at a station, 2 at an end
};

// The variable with which photons at a detector are counted for a question (count_algebra.hpp).
CountVariable count_variable(const model::Ask& ask);
// False where the detector's photons need not be followed at all.
bool is_looked_at(const model::Ask& ask);

// One photon order a detector, and the probability of the dark events that then complete the answer. Detectors without
// a variable have order 0.
struct DarkWeight {
  std::vector<long> orders;
  Interval weight;
  long total_order() const;
};

// Every combination of photon orders, the last detector's order varying fastest. Independent dark events: silent 1-d,
// fires d, exactly k (1-d) mu^k/k! with mu = -ln(1-d). Shared background: no detector of S fires with probability (1 +
// b sum_S eta/(F M))^-M; a counting detector (counts > 0) must then not be asked.
std::vector<DarkWeight> dark_weights(const DetectorGroup& group, Precision bits);

}  // namespace heraldgauge::reference::pair_number
