#pragma once
// A chain's exact numbers rounded once, to double-double, with every 1 - x formed there: the only place where the fast
// evaluator meets exact numbers.

#include <array>
#include <string>
#include <variant>

#include "fast/double_double.hpp"
#include "fast/pool.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::fast {

// One detector: the probability that an arriving photon registers (efficiency * (1-d) for thermal noise), d and 1-d.
struct DetectorNumbers {
  DoubleDouble registering;
  DoubleDouble dark;
  DoubleDouble live;  // 1 - dark
};

struct StationNumbers {
  model::Herald herald;
  DoubleDouble left_transmittance;   // of the arm R_{k-1} that enters as R
  DoubleDouble right_transmittance;  // of the arm L_k that enters as L
  DoubleDouble overlap;              // sqrt(t_R t_L v)
  std::array<DetectorNumbers, 4> detectors;
};

// An end's detectors with the arm before them: registering is efficiency * transmittance, missing = 1 - registering.
struct EndNumbers {
  std::array<DetectorNumbers, 2> detectors;
  std::array<DoubleDouble, 2> missing;
  model::Rational analyser_deg;  // reduced to [0, 180)
};

struct SourceNumbers {
  bool squeezed;
  DoubleDouble parameter;
  DoubleDouble vacuum;  // (1-lam)^2, or 1 - p
};

struct ChainNumbers {
  Buffer<SourceNumbers> sources;
  Buffer<StationNumbers> stations;
  EndNumbers left;
  EndNumbers right;
};

// The numbers, or the reason why this evaluator does not serve the chain, naming the key at fault.
std::variant<ChainNumbers, std::string> numbers_of(const model::Chain& chain);

// x to double-double, relative error below 2^-98.
DoubleDouble rounded(const model::Rational& x);
DoubleDouble rounded(const model::Real& x);

// x reduced to [0, 180), exactly.
model::Rational reduced_angle(const model::Rational& degrees);

// cos and sin of an angle in [0, 180) degrees; exactly 0 and 1 at 0 and 90, equal in size at 45 and 135.
CosineSine cosine_sine(const model::Rational& degrees);

}  // namespace heraldgauge::fast
