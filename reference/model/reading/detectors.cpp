#include "reference/model/reading/detectors.hpp"

#include <fmt/format.h>

#include "reference/model/reading/geometric.hpp"

namespace heraldgauge::model::reading {
namespace {

Scope offset(Scope scope, std::size_t by) { return static_cast<Scope>(static_cast<std::size_t>(scope) + by); }

// Reads one detector from its levels.
class DetectorReader {
 public:
  DetectorReader(const Point& point, const Levels& levels, Collector& faults)
      : point_(point), levels_(levels), faults_(faults) {}

  Detector read() const {
    Detector detector;
    const Entry* efficiency = entry_at(levels_, Field::efficiency);
    if (efficiency == nullptr) faults_.add(missing(point_, levels_.front().scope, Field::efficiency));
    const Rational eta = number_or_zero(efficiency == nullptr ? nullptr : efficiency->value);
    detector.efficiency = eta;
    detector.dark_probability = dark_probability(eta);
    if (is_word(value_at(levels_, Field::dark_model, point_.inputs), "thermal"))
      detector.dark_model = DarkModel::thermal;
    if (is_word(value_at(levels_, Field::detector_kind, point_.inputs), "resolving"))
      detector.kind = DetectorKind::resolving;
    return detector;
  }

 private:
  struct Dark {
    const Entry *probability = nullptr, *scale = nullptr, *slope = nullptr;
  };

  // The form of the most specific level at which one is given; a law may take one of its two numbers from a more
  // general level.
  Dark dark_entries() const {
    Dark dark;
    for (const Level& level : levels_) {
      if (level.entries == nullptr) continue;
      const auto here = [&](Field field) { return find(*level.entries, level.scope, field); };
      const Dark found{here(Field::dark_probability), here(Field::dark_scale), here(Field::dark_slope)};
      const Entry* law = found.scale != nullptr ? found.scale : found.slope;
      if (found.probability != nullptr && law != nullptr) {
        faults_.add(Fault{point_.location_of(*law), fmt::format("stands beside {}", *found.probability->name),
                          "either dark_probability, or dark_scale with dark_slope"});
      }
      if (found.probability != nullptr) dark = found;
      if (law != nullptr) dark.probability = nullptr;
      if (found.scale != nullptr) dark.scale = found.scale;
      if (found.slope != nullptr) dark.slope = found.slope;
    }
    return dark;
  }

  Real dark_probability(const Rational& eta) const {
    const Dark dark = dark_entries();
    if (dark.probability != nullptr) return number_or_zero(dark.probability->value);
    if (dark.scale == nullptr && dark.slope == nullptr) return 0;
    if (dark.scale == nullptr || dark.slope == nullptr) {
      faults_.add(
          missing(point_, levels_.front().scope, dark.scale == nullptr ? Field::dark_scale : Field::dark_slope));
      return 0;
    }
    if (dark.scale->value == nullptr || dark.slope->value == nullptr) return 0;
    const Rational scale = number_or_zero(dark.scale->value);
    const Rational exponent = number_or_zero(dark.slope->value) * eta;
    if (const auto below = exponential_is_below_one(scale, exponent); !below || !*below) {
      faults_.add(Fault{point_.location_of(*dark.scale),
                        fmt::format("{} * exp({}) {}", exact_text(scale), exact_text(exponent),
                                    below ? "is no dark probability" : "cannot be told from 1"),
                        "dark_scale * exp(dark_slope * efficiency) below 1"});
    }
    return Real(scale) * Real::exponential(exponent);
  }

  const Point& point_;
  const Levels& levels_;
  Collector& faults_;
};

Background background_at(const Point& point, const Levels& levels) {
  const Rational modes = number_or_zero(value_at(levels, Field::background_modes, point.inputs));
  return {number_or_zero(value_at(levels, Field::background_photons, point.inputs)), modes.get_num().get_si()};
}

}  // namespace

Herald herald_of(std::string_view word) {
  if (word == "psi-") return Herald::psi_minus;
  return word == "either" ? Herald::either : Herald::psi_plus;
}

Station plan_station(const Point& point, const Entries* own, Collector& faults) {
  Station station;
  const Levels place = {Level{&point.general, Scope::station}, Level{own, Scope::station_k}, Level{}};
  station.indistinguishability = number_or_zero(value_at(place, Field::indistinguishability, point.inputs));
  station.background = background_at(point, place);
  for (std::size_t index = 0; index < station.detectors.size(); ++index) {
    const Levels levels = {Level{&point.general, Scope::station_detector}, Level{own, Scope::station_k_detector},
                           Level{own, offset(Scope::station_k_cH, index)}};
    station.detectors[index] = DetectorReader(point, levels, faults).read();
  }
  return station;
}

End plan_end(const Point& point, Side side, Collector& faults) {
  const bool left = side == Side::left;
  const Entries* given = &point.general;
  End end;
  const Levels place = {Level{given, Scope::end}, Level{given, left ? Scope::end_left : Scope::end_right}, Level{}};
  end.background = background_at(point, place);
  end.analyser_deg = number_or_zero(point.value(Scope::analyser, left ? Field::left_deg : Field::right_deg));
  for (std::size_t index = 0; index < end.detectors.size(); ++index) {
    const Levels levels = {Level{given, Scope::end_detector},
                           Level{given, left ? Scope::end_left_detector : Scope::end_right_detector},
                           Level{given, offset(left ? Scope::end_left_plus : Scope::end_right_plus, index)}};
    end.detectors[index] = DetectorReader(point, levels, faults).read();
  }
  return end;
}

}  // namespace heraldgauge::model::reading
