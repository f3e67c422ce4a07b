#include "compare/chain_edits.hpp"
#include "compare/fock/departure.hpp"

namespace heraldgauge::compare {
namespace {

// A response may leave [0,1] by d, so a block of given pair numbers may by the product of all 1 + d, once for each of
// at most four outcomes a station.
fock::Interval tail_with_overlap(const model::Chain& chain, const std::vector<long>& cuts, reference::Precision bits) {
  fock::Interval tail = fock::tail_of_model(chain, cuts, bits);
  model::Chain copy = chain;
  for_each_detector(copy, [&](const model::Detector& detector) {
    tail *= reference::enclose(model::Real(1) + detector.dark_probability, bits);
  });
  for (std::size_t k = 0; k < chain.station_count(); ++k) tail = tail * 4L;
  return tail;
}

}  // namespace

Departure dark_overlap_dropped() {
  Departure departure;
  departure.id = "dark-overlap-dropped";
  departure.sentence = "Photon and dark clicks of a detector are added without taking off their overlap.";
  departure.replaces = "1-(1-d)(1-eta)^n by d + 1-(1-eta)^n";
  departure.claimed = "d far below 1";
  departure.source = "Ma, Qi, Zhao, Lo 2005, gain Y0 + 1 - exp(-eta mu) (formula from memory)";
  departure.touches = touches_probabilities;
  const auto change = [](fock::Description& description) { description.rule = fock::ClickRule::overlap_dropped; };
  return fock::by_changed_response(std::move(departure), change, tail_with_overlap);
}

}  // namespace heraldgauge::compare
