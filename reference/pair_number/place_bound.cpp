#include "reference/pair_number/place_bound.hpp"

#include <algorithm>

namespace heraldgauge::reference::pair_number {

PlaceBound::PlaceBound(const StationPlace& station, Precision bits)
    : bits_(bits),
      first_transmittance_(enclose(station.first_transmittance, bits)),
      second_transmittance_(enclose(station.second_transmittance, bits)) {
  const auto& detectors = station.station.detectors;
  for (const model::AcceptedOutcome& outcome : station.outcomes) {
    add_pattern({{detectors.begin(), detectors.end()},
                 {outcome.detectors.begin(), outcome.detectors.end()},
                 station.station.background,
                 4});
  }
}

PlaceBound::PlaceBound(const EndPlace& end, const EndAsk& ask, Precision bits)
    : bits_(bits), first_transmittance_(enclose(end.transmittance, bits)), second_transmittance_(bits) {
  const auto& detectors = end.end.detectors;
  add_pattern({{detectors.begin(), detectors.end()}, {ask.begin(), ask.end()}, end.end.background, 2});
}

void PlaceBound::add_pattern(const DetectorGroup& group) {
  for (const DarkWeight& weight : dark_weights(group, bits_)) {
    const auto order = static_cast<std::size_t>(weight.total_order());
    while (dark_.size() <= order) {
      dark_.emplace_back(bits_);
      registering_.emplace_back(bits_);
    }
    dark_[order] += weight.weight;
    Interval registering = weight.weight;
    for (std::size_t j = 0; j < weight.orders.size(); ++j) {
      const Interval eta = enclose(group.detectors[j].registering_probability(), bits_);
      registering *= power(eta, static_cast<unsigned long>(weight.orders[j]));
    }
    registering_[order] += registering;
  }
}

Matrix PlaceBound::thinned(const Interval& transmittance, long last) const {
  Matrix table(last + 1, order() + 1, bits_);
  for (long n = 0; n <= last; ++n) {
    table(n, 0) = Interval(1L, bits_);
    for (long i = 1; i <= std::min(n, order()); ++i) {
      Interval& entry = table(n, i);
      entry = table(n, i - 1) * transmittance * (n - i + 1);
      mpfi_div_si(entry.raw(), entry.raw(), i);
    }
  }
  return table;
}

Matrix PlaceBound::table(long first_last, long second_last) const {
  const Matrix first = thinned(first_transmittance_, first_last);
  const Matrix second = thinned(second_transmittance_, second_last);
  const Interval one(1L, bits_);
  Interval scratch(bits_);
  Matrix bound(first_last + 1, second_last + 1, bits_);
  for (long n = 0; n <= first_last; ++n) {
    for (long m = 0; m <= second_last; ++m) {
      for (long t = 0; t <= order(); ++t) {
        Interval moment(bits_);
        for (long i = std::max(0L, t - m); i <= std::min(t, n); ++i) {
          Interval::multiply(scratch, first(n, i), second(m, t - i));
          Interval::add(moment, moment, scratch);
        }
        const auto order = static_cast<std::size_t>(t);
        bound(n, m) += smaller_of(dark_[order], registering_[order] * moment);
      }
      bound(n, m) = smaller_of(one, bound(n, m));
    }
  }
  return bound;
}

std::vector<PlaceBound> station_bounds(const HeraldedChain& link, Precision bits) {
  std::vector<PlaceBound> bounds;
  for (std::size_t k = 0; k < link.station_count(); ++k) {
    if (k > 0 && link.station(k - 1) == link.station(k)) {
      bounds.push_back(bounds.back());
    } else {
      bounds.emplace_back(link.station(k), bits);
    }
  }
  return bounds;
}

std::vector<PlaceBound> all_places(const HeraldedChain& link, const EndAsk& left, const EndAsk& right, Precision bits) {
  std::vector<PlaceBound> places = station_bounds(link, bits);
  places.insert(places.begin(), PlaceBound(link.left_end(), left, bits));
  places.emplace_back(link.right_end(), right, bits);
  return places;
}

}  // namespace heraldgauge::reference::pair_number
