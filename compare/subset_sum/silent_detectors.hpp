#pragma once
// G(S): the probability that every detector of S stays silent, whatever the others do, in a machine arithmetic.

#include <array>
#include <cstdint>
#include <vector>

#include "reference/model/chain.hpp"

namespace heraldgauge::compare {

// One bit a detector: cH, cV, dH, dV of station 1, of station 2, ..., then left plus, left cross, right plus, right
// cross.
using DetectorSet = std::uint64_t;

// The chain in binary64 or binary32 (Number is double or float), each number the nearest to the exact one.
template <class Number>
class SilentDetectors {
 public:
  explicit SilentDetectors(const model::Chain& chain);

  std::size_t station_count() const { return stations_.size(); }
  // `corrected`: the right analyser is turned to minus its angle, as after an odd number of psi- outcomes.
  Number no_click(DetectorSet silent, bool corrected) const;

 private:
  struct Detector {
    Number registering;  // probability that one photon registers
    Number quiet;        // probability of no dark event
  };
  struct Background {
    Number photons;
    Number modes;
  };
  struct Station {
    Number right_transmittance;  // of the arm R that arrives from the left
    Number left_transmittance;   // of the arm L that arrives from the right
    Number indistinguishability;
    std::array<Detector, 4> detectors;
    Background background;
  };
  struct End {
    Number transmittance;
    Number angle;  // radians
    std::array<Detector, 2> detectors;
    Background background;
  };
  // One 2x2 block of 1 - K: entrance element a, exit element b, off-diagonal x.
  struct Block {
    Number a;
    Number b;
    Number x;
  };
  class Ring;

  static Detector in_numbers(const model::Detector& detector);
  static Background in_numbers(const model::Background& background);
  static End in_numbers(const model::End& end, const model::Arm& arm);
  template <std::size_t count>
  static Number quiet(const std::array<Detector, count>& detectors, const Background& background, DetectorSet silent);
  static Block polarisation_block(const Station& station, DetectorSet silent, std::size_t polarisation);
  static Block end_block(const End& end, DetectorSet silent, Number angle);
  Number dark_factor(DetectorSet silent) const;

  std::vector<Number> pair_parameters_;
  std::vector<Station> stations_;
  End left_end_;
  End right_end_;
};

}  // namespace heraldgauge::compare
