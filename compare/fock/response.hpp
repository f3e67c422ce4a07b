#pragma once
// Detectors as what they answer to n arriving photons: any response that is diagonal in the photon number.

#include <vector>

#include "compare/fock/arithmetic.hpp"
#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::compare::fock {

// What "click" means.
enum class ClickRule {
  threshold,        // at least one photon registered or a dark event, as in the model
  linear,           // 1-(1-eta)^n replaced by n eta, at most 1
  one_photon,       // exactly one count registered
  overlap_dropped,  // the probabilities of a photon click and a dark event added: d + 1-(1-eta)^n
};

// Which part of a click: all of it, or only that without any photon (a dark event alone).
enum class ClickPart { whole, dark_only };

// The probability of the answer for n = 0..most_photons photons at the detector (1 where it is not looked at). Dark
// events of a counting detector are Poissonian of mean -ln(1-d).
template <class Number>
std::vector<Number> response(const Arithmetic<Number>& number, const model::Detector& detector, const model::Ask& ask,
                             ClickRule rule, ClickPart part, long most_photons);

}  // namespace heraldgauge::compare::fock
