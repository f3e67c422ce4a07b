// Shortcuts about what a detector answers to n photons.

#include "compare/chain_edits.hpp"
#include "compare/fock/departure.hpp"

namespace heraldgauge::compare {
namespace {

using fock::ClickRule;
using fock::Description;
using model::Chain;

std::vector<long> full_cuts(const Chain& chain, const Setting&, double log2_tail) {
  return fock::cuts_for_model(chain, log2_tail);
}

using Tail = fock::Interval (*)(const Chain&, const std::vector<long>&, reference::Precision);

Departure by_response(Departure departure, const std::function<void(Description&)>& change,
                      Tail tail = fock::tail_of_model) {
  departure.source = "common practice";
  departure.touches = touches_probabilities;
  const auto changed = [change](Description& description, const Setting&) { change(description); };
  return fock::by_fock(std::move(departure), {full_cuts, changed, tail});
}

// A response may leave [0,1] by d, so a block of given pair numbers may by the product of all 1 + d, once for each of
// at most four outcomes a station.
fock::Interval tail_with_overlap(const Chain& chain, const std::vector<long>& cuts, reference::Precision bits) {
  fock::Interval tail = fock::tail_of_model(chain, cuts, bits);
  Chain copy = chain;
  for_each_detector(copy, [&](const model::Detector& detector) {
    tail *= reference::enclose(model::Real(1) + detector.dark_probability, bits);
  });
  for (std::size_t k = 0; k < chain.station_count(); ++k) tail = tail * 4L;
  return tail;
}

}  // namespace

Departure linear_loss() {
  Departure departure;
  departure.id = "linear-loss";
  departure.sentence =
      "Every click probability of n photons at a detector is taken as n times the efficiency, at most 1.";
  departure.replaces = "1-(1-eta)^n by min(1, n eta)";
  departure.claimed = "eta far below 1";
  return by_response(std::move(departure), [](Description& description) { description.rule = ClickRule::linear; });
}

Departure resolving_detectors() {
  Departure departure;
  departure.id = "resolving-detectors";
  departure.sentence = "Every click means exactly one photon registered, with the same efficiency and dark counts.";
  departure.replaces = "P(click | n) by P(one count | n)";
  departure.claimed = "lam eta far below 1";
  return by_response(std::move(departure), [](Description& description) { description.rule = ClickRule::one_photon; });
}

Departure no_double_dark() {
  Departure departure;
  departure.id = "no-double-dark";
  departure.sentence = "A herald never comes from two dark events: that term is dropped at every station.";
  departure.replaces = "P(two clicks) by P(two clicks) - P(two clicks without any photon in either)";
  departure.claimed = "d far below eta t lam";
  return by_response(std::move(departure), [](Description& description) { description.with_double_dark = false; });
}

Departure dark_overlap_dropped() {
  Departure departure;
  departure.id = "dark-overlap-dropped";
  departure.sentence = "Photon and dark clicks of a detector are added without taking off their overlap.";
  departure.replaces = "1-(1-d)(1-eta)^n by d + 1-(1-eta)^n";
  departure.claimed = "d far below 1";
  departure = by_response(
      std::move(departure), [](Description& description) { description.rule = ClickRule::overlap_dropped; },
      tail_with_overlap);
  departure.source = "Ma, Qi, Zhao, Lo 2005, gain Y0 + 1 - exp(-eta mu) (formula from memory)";
  return departure;
}

}  // namespace heraldgauge::compare
