#pragma once
// What the kernel is asked to do, the same for every lane: cut-offs, stations' structure, which outcomes at which
// angles. Points whose plans are equal go through the kernel together.

#include <array>
#include <vector>

#include "fast/ends.hpp"
#include "fast/numbers.hpp"
#include "fast/station_elements.hpp"

namespace heraldgauge::fast {

// One product (H outcome) x (V outcome) of a station's operator. Outcomes: 0 = c clicks, 1 = d clicks, 2 = the sum of
// both.
struct Term {
  int h;
  int v;
  bool minus;  // psi-
  friend bool operator==(const Term&, const Term&) = default;
};

struct StationPlan {
  std::array<std::array<Overlap, 2>, 2> overlap;  // [polarisation][c or d clicks]
  std::array<bool, 2> alike;                      // c and d alike, for H and V
  bool polarisations_alike;                       // V as H
  bool as_before;                                 // same numbers and cut-offs as the station before
  std::vector<Term> terms;
  friend bool operator==(const StationPlan&, const StationPlan&) = default;
};

// An end's vector that is carried through, or contracted with: an outcome at an angle.
struct EndView {
  model::Rational angle;
  int outcome;
  bool sectors;  // Delta > 0 is needed too
  friend bool operator==(const EndView&, const EndView&) = default;
};

struct Pairing {
  int left;   // index into Plan::left
  int right;  // index into Plan::right
  // Recorded bits exchanged after an odd number of psi-: the right outcome used then, and its sectors change sign.
  int right_odd;
  // The left outcome is the mirror image (V -> -V) of the view: sectors of odd Delta change sign.
  bool mirrored = false;
  friend bool operator==(const Pairing&, const Pairing&) = default;
};

struct Plan {
  std::vector<int> cutoffs;  // pairs kept per source
  std::vector<bool> squeezed;
  std::vector<StationPlan> stations;
  std::vector<EndView> left;
  std::vector<EndView> right;
  std::vector<Pairing> pairings;
  bool parity = false;  // carry even and odd numbers of psi- apart
  bool odd = false;     // an odd number of psi- for certain
  friend bool operator==(const Plan&, const Plan&) = default;

  int deltas() const;  // the largest Delta that every cut-off allows
};

// Detectors, arms and sources of a chain as the kernel wants them.
template <class T>
struct StationMode {
  std::array<std::array<ClickMode<T>, 2>, 2> click;  // [polarisation][c or d clicks]
  Rough<T> registering_r, registering_l, dark;       // largest over the detectors, arm included: for the tail bound
};

template <class T>
struct LinkModes {
  std::vector<T> parameter, vacuum;  // sources
  std::vector<StationMode<T>> stations;
  EndMode<T> left, right;
};

}  // namespace heraldgauge::fast
