#include "fast/modes.hpp"

#include <algorithm>

namespace heraldgauge::fast {
namespace {

using DD = DoubleDouble;

DD half(const DD& x) { return {x.hi / 2, x.lo / 2}; }

class Builder {
 public:
  explicit Builder(double& smallest) : smallest_(smallest) {}

  DD complement(const DD& x) {
    const DD rest = DD(1) - x;
    if (rest.hi != 0) smallest_ = std::min(smallest_, rest.hi);
    return rest;
  }

  ClickMode<DD> click_mode(const StationNumbers& station, const DetectorNumbers& clicking,
                           const DetectorNumbers& silent) {
    const DD click = half(clicking.registering);
    const DD quiet = half(silent.registering);
    const DD both = click + quiet;
    ClickMode<DD> mode;
    mode.a1 = complement(quiet * station.left_transmittance);
    mode.b1 = complement(quiet * station.right_transmittance);
    mode.x1 = quiet * station.overlap;
    mode.a0 = complement(both * station.left_transmittance);
    mode.b0 = complement(both * station.right_transmittance);
    mode.click_r = click * station.left_transmittance;
    mode.click_l = click * station.right_transmittance;
    const bool better = quiet < click;
    mode.x0 = (better ? click - quiet : quiet - click) * station.overlap;
    const DD excess = click - quiet - quiet;
    mode.step = (better ? (excess.hi > 0 ? excess : -excess) : click) * station.overlap;
    mode.dark = clicking.dark;
    mode.two_minus_dark = DD(1) + clicking.live;
    mode.live = silent.live;
    return mode;
  }

 private:
  double& smallest_;
};

Overlap overlap_of(const DetectorNumbers& clicking, const DetectorNumbers& silent) {
  const DD click = clicking.registering;
  const DD quiet = silent.registering;
  if (click == quiet) return Overlap::zero;
  if (click < quiet) return Overlap::positive;
  return quiet + quiet < click ? Overlap::larger : Overlap::negative;
}

bool same(const DetectorNumbers& a, const DetectorNumbers& b) {
  return a.registering == b.registering && a.dark == b.dark;
}

bool same(const StationNumbers& a, const StationNumbers& b) {
  for (std::size_t i = 0; i < 4; ++i) {
    if (!same(a.detectors[i], b.detectors[i])) return false;
  }
  return a.herald == b.herald && a.left_transmittance == b.left_transmittance &&
         a.right_transmittance == b.right_transmittance && a.overlap == b.overlap;
}

bool polarisations_alike(const StationNumbers& station) {
  return same(station.detectors[0], station.detectors[1]) && same(station.detectors[2], station.detectors[3]);
}

StationStructure structure_of(const StationNumbers& station) {
  StationStructure structure{};
  for (std::size_t p = 0; p < 2; ++p) {
    const DetectorNumbers& c = station.detectors[p];
    const DetectorNumbers& d = station.detectors[p + 2];
    structure.overlap[p] = {overlap_of(c, d), overlap_of(d, c)};
    structure.alike[p] = same(c, d);
  }
  structure.polarisations_alike = polarisations_alike(station);
  return structure;
}

StationMode<DD> station_mode(const StationNumbers& station, Builder& build) {
  StationMode<DD> mode;
  double registering = 0;
  double dark = 0;
  for (std::size_t p = 0; p < 2; ++p) {
    const DetectorNumbers& c = station.detectors[p];
    const DetectorNumbers& d = station.detectors[p + 2];
    if (p == 1 && polarisations_alike(station)) {
      mode.click[1] = mode.click[0];
    } else {
      const ClickMode<DD> c_clicks = build.click_mode(station, c, d);
      mode.click[p] = {c_clicks, same(c, d) ? c_clicks : build.click_mode(station, d, c)};
    }
    registering = std::max({registering, c.registering.hi, d.registering.hi});
    dark = std::max({dark, c.dark.hi, d.dark.hi});
  }
  mode.registering_r = registering * station.left_transmittance.hi;
  mode.registering_l = registering * station.right_transmittance.hi;
  mode.dark = dark;
  return mode;
}

EndMode<DD> end_mode(const EndNumbers& end) {
  EndMode<DD> mode;
  for (std::size_t i = 0; i < 2; ++i) {
    mode.registering[i] = end.detectors[i].registering;
    mode.missing[i] = end.missing[i];
    mode.dark[i] = end.detectors[i].dark;
    mode.live[i] = end.detectors[i].live;
  }
  return mode;
}

template <class T>
void put(T& to, int lane, const DD& x) {
  set_lane(to, lane, x.hi);
}
void put(DD& to, int, const DD& x) { to = x; }

template <class T>
void put(ClickMode<T>& to, int lane, const ClickMode<DD>& from) {
  put(to.a1, lane, from.a1);
  put(to.b1, lane, from.b1);
  put(to.x1, lane, from.x1);
  put(to.a0, lane, from.a0);
  put(to.b0, lane, from.b0);
  put(to.x0, lane, from.x0);
  put(to.click_r, lane, from.click_r);
  put(to.click_l, lane, from.click_l);
  put(to.step, lane, from.step);
  put(to.dark, lane, from.dark);
  put(to.two_minus_dark, lane, from.two_minus_dark);
  put(to.live, lane, from.live);
}

template <class T>
void put(EndMode<T>& to, int lane, const EndMode<DD>& from) {
  for (std::size_t i = 0; i < 2; ++i) {
    put(to.registering[i], lane, from.registering[i]);
    put(to.missing[i], lane, from.missing[i]);
    put(to.dark[i], lane, from.dark[i]);
    put(to.live[i], lane, from.live[i]);
  }
}

template <class T>
void put(StationMode<T>& to, int lane, const StationMode<DD>& from) {
  for (std::size_t p = 0; p < 2; ++p) {
    for (std::size_t o = 0; o < 2; ++o) put(to.click[p][o], lane, from.click[p][o]);
  }
  set_lane(to.registering_r, lane, from.registering_r);
  set_lane(to.registering_l, lane, from.registering_l);
  set_lane(to.dark, lane, from.dark);
}

}  // namespace

ExactModes modes_of(const ChainNumbers& numbers) {
  ExactModes result;
  Builder build(result.smallest_complement);
  result.modes.parameter.reserve(numbers.sources.size());
  result.modes.vacuum.reserve(numbers.sources.size());
  result.modes.stations.reserve(numbers.stations.size());
  result.structure.reserve(numbers.stations.size());
  for (const SourceNumbers& source : numbers.sources) {
    result.modes.parameter.push_back(source.parameter);
    result.modes.vacuum.push_back(source.vacuum);
    build.complement(source.parameter);
  }
  for (std::size_t k = 0; k < numbers.stations.size(); ++k) {
    const bool as_before = k > 0 && same(numbers.stations[k], numbers.stations[k - 1]);
    result.structure.push_back(as_before ? result.structure.back() : structure_of(numbers.stations[k]));
    result.structure.back().as_before = as_before;
    result.modes.stations.push_back(as_before ? result.modes.stations.back()
                                              : station_mode(numbers.stations[k], build));
  }
  for (const EndNumbers* end : {&numbers.left, &numbers.right}) {
    for (std::size_t i = 0; i < 2; ++i) build.complement(end->detectors[i].registering);
  }
  result.modes.left = end_mode(numbers.left);
  result.modes.right = end_mode(numbers.right);
  return result;
}

EndMode<double> rounded_end(const EndMode<DD>& end) {
  EndMode<double> result;
  put(result, 0, end);
  return result;
}

template <class T>
LinkModes<T> rounded_modes(const std::vector<const LinkModes<DD>*>& modes) {
  LinkModes<T> result;
  const std::size_t sources = modes.front()->parameter.size();
  result.parameter.resize(sources);
  result.vacuum.resize(sources);
  result.stations.resize(sources - 1);
  for (std::size_t i = 0; i < modes.size(); ++i) {
    const int lane = static_cast<int>(i);
    for (std::size_t k = 0; k < sources; ++k) {
      put(result.parameter[k], lane, modes[i]->parameter[k]);
      put(result.vacuum[k], lane, modes[i]->vacuum[k]);
    }
    for (std::size_t k = 0; k + 1 < sources; ++k) put(result.stations[k], lane, modes[i]->stations[k]);
    put(result.left, lane, modes[i]->left);
    put(result.right, lane, modes[i]->right);
  }
  return result;
}

template LinkModes<double> rounded_modes(const std::vector<const LinkModes<DD>*>&);
template LinkModes<DD> rounded_modes(const std::vector<const LinkModes<DD>*>&);
template LinkModes<Lanes<batch_width>> rounded_modes(const std::vector<const LinkModes<DD>*>&);

}  // namespace heraldgauge::fast
