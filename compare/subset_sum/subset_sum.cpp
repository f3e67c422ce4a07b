#include "compare/subset_sum/subset_sum.hpp"

#include <bit>
#include <optional>
#include <string>
#include <vector>

#include "compare/subset_sum/silent_detectors.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::compare {
namespace {

using model::Ask;

// A pattern as the detectors that must click and those that must stay silent.
struct Clicks {
  DetectorSet click = 0;
  DetectorSet silent = 0;
};

// A string of station outcomes, and whether its number of psi- is odd.
struct Outcome {
  Clicks clicks;
  bool odd = false;
};

template <std::size_t count>
Clicks clicks_of(const std::array<Ask, count>& asks, std::size_t first_detector) {
  Clicks clicks;
  for (std::size_t j = 0; j < count; ++j) {
    const DetectorSet detector = DetectorSet{1} << (first_detector + j);
    if (asks[j].kind == Ask::Kind::clicks) clicks.click |= detector;
    if (asks[j].kind == Ask::Kind::silent) clicks.silent |= detector;
  }
  return clicks;
}

// All strings of accepted outcomes.
std::vector<Outcome> accepted_strings(const model::Chain& chain) {
  std::vector<Outcome> strings(1);
  for (std::size_t k = 0; k < chain.stations.size(); ++k) {
    std::vector<Outcome> longer;
    for (const Outcome& begun : strings) {
      for (const model::AcceptedOutcome& next : model::accepted_outcomes(chain.stations[k].herald)) {
        const Clicks added = clicks_of(next.detectors, 4 * k);
        longer.push_back(
            {{begun.clicks.click | added.click, begun.clicks.silent | added.silent}, begun.odd != next.minus});
      }
    }
    strings = std::move(longer);
  }
  return strings;
}

// sum over S in C of (-1)^|S| G(S u Z); s - C and C gives the subsets of C in rising order.
template <class Number>
Number probability(const SilentDetectors<Number>& chain, const Clicks& clicks, bool odd) {
  Number sum = 0;
  DetectorSet subset = 0;
  do {
    const Number term = chain.no_click(subset | clicks.silent, odd);
    sum += std::popcount(subset) % 2 == 0 ? term : -term;
    subset = (subset - clicks.click) & clicks.click;
  } while (subset != 0);
  return sum;
}

// The four end detectors with a 1 for a click: left plus, left cross, right plus, right cross, the first as highest
// bit.
Clicks end_clicks(unsigned left, unsigned right, std::size_t first_detector) {
  std::array<Ask, 4> asks;
  const unsigned bits = left << 2U | right;
  for (std::size_t j = 0; j < 4; ++j)
    asks[j].kind = (bits >> (3 - j) & 1U) != 0 ? Ask::Kind::clicks : Ask::Kind::silent;
  return clicks_of(asks, first_detector);
}

bool counts_photons(const model::Chain& chain) {
  const auto counts = [](const auto& place) {
    for (const model::Detector& detector : place.detectors) {
      if (detector.kind == model::DetectorKind::resolving) return true;
    }
    return false;
  };
  for (const model::Station& station : chain.stations) {
    if (counts(station)) return true;
  }
  return counts(chain.left_end) || counts(chain.right_end);
}

std::optional<model::Fault> not_served(const model::Chain& chain) {
  const auto fault = [](const std::string& wrong, const std::string& allowed) {
    return model::Fault{{"subset sum", 0, 0, ""}, wrong, allowed};
  };
  for (const model::Source& source : chain.sources) {
    if (source.kind != model::SourceKind::squeezed) return fault("a source is not squeezed", "squeezed sources");
  }
  if (counts_photons(chain)) return fault("a detector counts photons", "threshold detectors");
  if (chain.station_count() > largest_subset_sum_stations) {
    return fault("there are too many stations", "at most " + std::to_string(largest_subset_sum_stations));
  }
  return std::nullopt;
}

}  // namespace

template <class Number>
model::Expected<SubsetSum> subset_sum(const model::Chain& chain) {
  if (const auto fault = not_served(chain)) return *fault;
  const SilentDetectors<Number> numbers(chain);
  const std::size_t first_end_detector = 4 * chain.station_count();
  SubsetSum sum;
  for (const Outcome& outcome : accepted_strings(chain)) {
    sum.herald += probability(numbers, outcome.clicks, outcome.odd);
    for (unsigned left = 0; left < 4; ++left) {
      for (unsigned right = 0; right < 4; ++right) {
        const Clicks ends = end_clicks(left, right, first_end_detector);
        const Clicks all = {outcome.clicks.click | ends.click, outcome.clicks.silent | ends.silent};
        sum.joint[left][right] += probability(numbers, all, outcome.odd);
      }
    }
  }
  return sum;
}
template model::Expected<SubsetSum> subset_sum<float>(const model::Chain&);
template model::Expected<SubsetSum> subset_sum<double>(const model::Chain&);

}  // namespace heraldgauge::compare
