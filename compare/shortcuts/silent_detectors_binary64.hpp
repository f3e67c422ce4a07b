#pragma once
// G(S): the probability that every detector of S stays silent, whatever the others do, in binary64.

#include <array>
#include <cstdint>
#include <vector>

#include "reference/model/chain.hpp"

namespace heraldgauge::compare {

// One bit a detector: cH, cV, dH, dV of station 1, of station 2, ..., then left plus, left cross, right plus, right
// cross.
using DetectorSet = std::uint64_t;

// The chain in binary64, each number the nearest to the exact one.
class ChainBinary64 {
 public:
  explicit ChainBinary64(const model::Chain& chain);

  std::size_t station_count() const { return stations_.size(); }
  // `corrected`: the right analyser is turned to minus its angle, as after an odd number of psi- outcomes.
  double no_click(DetectorSet silent, bool corrected) const;

 private:
  struct Detector {
    double registering;  // probability that one photon registers
    double quiet;        // probability of no dark event
  };
  struct Background {
    double photons;
    double modes;
  };
  struct Station {
    double right_transmittance;  // of the arm R that arrives from the left
    double left_transmittance;   // of the arm L that arrives from the right
    double indistinguishability;
    std::array<Detector, 4> detectors;
    Background background;
  };
  struct End {
    double transmittance;
    double angle;  // radians
    std::array<Detector, 2> detectors;
    Background background;
  };
  // One 2x2 block of 1 - K: entrance element a, exit element b, off-diagonal x.
  struct Block {
    double a;
    double b;
    double x;
  };
  class Ring;

  static Detector in_binary64(const model::Detector& detector);
  static Background in_binary64(const model::Background& background);
  static End in_binary64(const model::End& end, const model::Arm& arm);
  template <std::size_t count>
  static double quiet(const std::array<Detector, count>& detectors, const Background& background, DetectorSet silent);
  static Block polarisation_block(const Station& station, DetectorSet silent, std::size_t polarisation);
  static Block end_block(const End& end, DetectorSet silent, double angle);
  double dark_factor(DetectorSet silent) const;

  std::vector<double> pair_parameters_;
  std::vector<Station> stations_;
  End left_end_;
  End right_end_;
};

}  // namespace heraldgauge::compare
