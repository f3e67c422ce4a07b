#pragma once
// The chain as plain data: N swap stations, N + 1 pair sources, two measured ends. Every number is exact and has been
// checked against its range; no physics here.
//
// Source k = 0..N feeds the arms L_k and R_k. The left end measures L_0, the right end R_N, and station k = 1..N
// measures R_{k-1} together with L_k; stations[k-1] holds station k.

#include <array>
#include <cstddef>
#include <vector>

#include "reference/model/real.hpp"

namespace heraldgauge::model {

enum class SourceKind { squeezed, ideal_pair };
enum class DarkModel { independent, thermal };
enum class DetectorKind { threshold, resolving };
enum class Herald { psi_plus, psi_minus, either };

struct Source {
  SourceKind kind = SourceKind::squeezed;
  Real pair_parameter;  // squeezed: lam = tanh(chi)^2 in [0,1); ideal pair: the probability of one pair, in [0,1]
  friend bool operator==(const Source&, const Source&) = default;
};

struct Arm {
  Real transmittance;  // of power, in [0,1]
  friend bool operator==(const Arm&, const Arm&) = default;
};

struct Detector {
  Real efficiency;        // in [0,1]
  Real dark_probability;  // per trial, in [0,1)
  DarkModel dark_model = DarkModel::independent;
  DetectorKind kind = DetectorKind::threshold;
  friend bool operator==(const Detector&, const Detector&) = default;

  // The probability that one photon that arrives registers: eta, and eta (1-d) where the noise is thermal in the
  // detected mode (Rohde and Ralph 2006, attribution from memory).
  Real registering_probability() const {
    return dark_model == DarkModel::thermal ? efficiency * (Real(1) - dark_probability) : efficiency;
  }
};

// Thermal modes orthogonal to the signal, shared by all detectors of a place.
struct Background {
  Real photons;    // mean photon number of all modes together, >= 0
  long modes = 1;  // >= 1
  friend bool operator==(const Background&, const Background&) = default;
};

enum StationDetector : std::size_t { cH, cV, dH, dV };
enum EndDetector : std::size_t { plus, cross };

struct Station {
  Herald herald = Herald::psi_plus;
  Real indistinguishability = Real(1);  // v in [0,1]
  std::array<Detector, 4> detectors;    // in the order cH, cV, dH, dV
  Background background;
  friend bool operator==(const Station&, const Station&) = default;
};

struct End {
  std::array<Detector, 2> detectors;  // plus, cross
  Background background;
  Rational analyser_deg;
  friend bool operator==(const End&, const End&) = default;
};

struct Protocol {
  Rational sifting{1, 2};                    // in (0,1]
  Rational error_correction_factor{29, 25};  // f >= 1
  friend bool operator==(const Protocol&, const Protocol&) = default;
};

struct Chain {
  std::vector<Source> sources;  // N + 1
  std::vector<Arm> left_arms;   // N + 1: L_0 .. L_N
  std::vector<Arm> right_arms;  // N + 1: R_0 .. R_N
  std::vector<Station> stations;
  End left_end;
  End right_end;
  Protocol protocol;
  friend bool operator==(const Chain&, const Chain&) = default;

  std::size_t station_count() const { return stations.size(); }
};

// The same chain seen from the other end: sources, arms, stations and ends in reverse order. At a station the two
// inputs exchange, so detectors c stay and detectors d stay (only the sign of a field amplitude changes).
Chain mirrored(const Chain& chain);

}  // namespace heraldgauge::model
