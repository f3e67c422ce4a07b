#pragma once
// What the kernel is asked to do, the same for every lane: cut-offs, stations' structure, which outcomes at which
// angles. Points whose plans are equal go through the kernel together.

#include <array>
#include <vector>

#include "fast/ends.hpp"
#include "fast/numbers.hpp"
#include "fast/pool.hpp"
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
  // A free pattern: one term, whose two factors are what is demanded of [polarisation][c, d].
  bool free = false;
  std::array<std::array<Demand, 2>, 2> demands{};
  friend bool operator==(const StationPlan&, const StationPlan&) = default;
};

// An end's vector that is carried through, or contracted with: an outcome at an angle.
struct EndView {
  model::Rational angle;
  int outcome;
  bool sectors;    // Delta > 0 is needed too
  bool symmetric;  // on the left: exchanging a and b changes nothing, at any place of the chain
  friend bool operator==(const EndView&, const EndView&) = default;
};

struct Pairing {
  int left;   // index into Plan::left
  int right;  // index into Plan::right
  // Recorded bits exchanged after an odd number of psi-: the right outcome used then, and its sectors change sign; the
  // same as `right` where the two outcomes are mirror images, which undoes the change of sign.
  int right_odd;
  // One outcome is the mirror image (V -> -V) of its view: sectors of odd Delta change sign.
  bool mirrored = false;
  bool transposed = false;  // H and V exchanged in one of the two; sector 0 only
  friend bool operator==(const Pairing&, const Pairing&) = default;
};

// A left view that the herald contains, and how often: the outcomes at 0 degrees, each as it is or with H and V
// exchanged.
struct HeraldPart {
  int view;
  double times;
  friend bool operator==(const HeraldPart&, const HeraldPart&) = default;
};

struct Plan {
  std::vector<int> cutoffs;  // pairs kept per source
  std::vector<bool> squeezed;
  std::vector<StationPlan> stations;
  std::vector<EndView> left;
  std::vector<EndView> right;
  std::vector<Pairing> pairings;
  std::vector<HeraldPart> herald;
  bool polarisations_alike = false;  // at every station
  bool parity = false;               // carry even and odd numbers of psi- apart
  bool odd = false;                  // an odd number of psi- for certain
  bool majorant = false;             // of a free pattern: sizes of all terms instead of their sum
  int final_view = -1;               // the left view whose vector is asked for at the right end, if any
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
  Buffer<T> parameter, vacuum;  // sources
  Buffer<StationMode<T>> stations;
  EndMode<T> left, right;
};

}  // namespace heraldgauge::fast
