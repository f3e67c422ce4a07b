#include <algorithm>
#include <cmath>

#include "reference/pair_number/cutoffs.hpp"
#include "reference/pair_number/route.hpp"
#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference {
namespace {

using namespace pair_number;
using model::Ask;

const model::Real largest_pair_parameter = model::Rational(19, 20);

// Number-resolving detectors have a Poisson count of dark events; thermal noise of the mode has no such model.
bool is_undefined(const model::Detector& detector) {
  return detector.kind == model::DetectorKind::resolving && detector.dark_model == model::DarkModel::thermal &&
         !detector.dark_probability.is_zero();
}

template <class Detectors>
bool any_undefined(const Detectors& detectors) {
  return std::any_of(detectors.begin(), detectors.end(), is_undefined);
}

template <class Asks>
bool counts_under_background(const Asks& asks, const model::Background& background) {
  return !background.photons.is_zero() && std::any_of(asks.begin(), asks.end(), [](const Ask& ask) {
    return ask.kind == Ask::Kind::counts && ask.photons > 0;
  });
}

double triangle(long rows) { return 0.5 * static_cast<double>(rows) * static_cast<double>(rows + 1); }

// One product applied to one state.
double step_cost(long first_cut, long second_cut, long sector) {
  const long first = std::max(first_cut - sector + 1, 0L);
  const long second = std::max(second_cut - sector + 1, 0L);
  return triangle(first) * static_cast<double>(second) + static_cast<double>(first) * triangle(second);
}

// Products that are left of a station's outcomes once those with the same H part are added.
double product_count(const model::Station& station) {
  const double with_background = station.background.photons.is_zero() ? 1 : 2;
  return with_background * (station.detectors[model::cH] == station.detectors[model::dH] ? 1 : 2);
}

// Both polarisations' elements of one station, each with two orders and six terms, for all sectors or Delta = 0, 1.
double element_cost(long first_cut, long second_cut, long sectors) {
  double elements = 0;
  for (long sector = 0; sector <= std::max(sectors, 1L); ++sector) {
    elements += static_cast<double>(std::max(first_cut - sector + 1, 0L)) *
                static_cast<double>(std::max(second_cut - sector + 1, 0L));
  }
  return 24 * elements;
}

}  // namespace

std::optional<std::string> pair_number_refusal(const model::Chain& chain) {
  for (std::size_t k = 0; k < chain.sources.size(); ++k) {
    if (chain.sources[k].kind == model::SourceKind::squeezed &&
        !certainly_less(enclose(chain.sources[k].pair_parameter, 64), enclose(largest_pair_parameter, 64))) {
      return "source " + std::to_string(k) + " has a pair parameter of 0.95 or more, which needs thousands of pairs";
    }
  }
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    if (!any_undefined(chain.stations[k].detectors)) continue;
    return "station " + std::to_string(k + 1) + " has a number-resolving detector with thermal dark counts";
  }
  if (any_undefined(chain.left_end.detectors) || any_undefined(chain.right_end.detectors)) {
    return "an end has a number-resolving detector with thermal dark counts";
  }
  return std::nullopt;
}

std::optional<std::string> pair_number_refusal(const model::Chain& chain, const model::Pattern& pattern) {
  const std::string clause = " asks for a photon count under a shared background";
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    if (!counts_under_background(pattern.stations[k], chain.stations[k].background)) continue;
    return "the pattern of station " + std::to_string(k + 1) + clause;
  }
  if (counts_under_background(pattern.left, chain.left_end.background) ||
      counts_under_background(pattern.right, chain.right_end.background)) {
    return "the pattern of an end" + clause;
  }
  return pair_number_refusal(chain);
}

double pair_number_cost(const model::Chain& chain, const Accuracy& accuracy, bool needs_all_delta) {
  constexpr double end_patterns = 4;
  const std::vector<long> cutoffs = estimated_cutoffs(heralded(chain), EndAsk{}, EndAsk{}, accuracy.log2_tail).pairs;
  const long sectors = needs_all_delta ? sectors_within(cutoffs) : 0;
  double cost = end_patterns * triangle(cutoffs.front() + 1);
  for (std::size_t k = 0; k < chain.station_count(); ++k) {
    const double tail = 2 * step_cost(cutoffs[k], cutoffs[k + 1], 0);  // both configurations within the cut-offs
    double kept = 0;
    for (long sector = 0; sector <= sectors; ++sector) kept += step_cost(cutoffs[k], cutoffs[k + 1], sector);
    cost += end_patterns * product_count(chain.stations[k]) * (kept + tail);
    cost += element_cost(cutoffs[k], cutoffs[k + 1], sectors);
  }
  return cost;
}

double pair_number_log2_herald(const model::Chain& chain) {
  return estimated_cutoffs(heralded(chain), EndAsk{}, EndAsk{}, -64).log2_herald;
}

}  // namespace heraldgauge::reference
