#pragma once
// The operator of one station, for the outcomes that its terms ask for.

#include <array>
#include <vector>

#include "fast/pattern_elements.hpp"
#include "fast/plan.hpp"
#include "fast/station_elements.hpp"

namespace heraldgauge::fast {

// What one term applies to H and to V.
template <class T>
struct TermFactors {
  const Elements<T>& h;
  const Elements<T>& v;
  bool alike;  // the same for H and V, but for a factor
};

template <class T>
class StationOperator {
 public:
  void prepare(const StationPlan& station, const StationMode<T>& mode, bool majorant, int in, int out) {
    if constexpr (Precision<T>::width == 1) {  // free patterns go through the kernel alone
      if (station.free) return prepare_free(station, mode, majorant, in, out);
    }
    loss_ = Rough<T>(1.0);
    shared_ = station.polarisations_alike;
    alike_ = station.alike;
    for (std::size_t p = 0; p < (shared_ ? 1 : 2); ++p) {
      auto& [c, d, both] = elements_[p];
      c = click_elements(mode.click[p][0], station.overlap[p][0], in, out, loss_);
      if (!alike_[p]) d = click_elements(mode.click[p][1], station.overlap[p][1], in, out, loss_);
      both = c;
      both += alike_[p] ? c : d;
    }
  }

  TermFactors<T> factors(const Term& term) const {
    return {elements(0, term.h), elements(shared_ ? 0 : 1, term.v), shared_ && (term.h == term.v || alike_[0])};
  }

  // station_count() takes four roundings a photon and 14 for two elements. A term of a free pattern's element has one
  // factor a photon, from one of the recurrences: at most five roundings (coefficient, product, three sums, where there
  // are two addends). Dark events add three sums and three products, a silent detector one: seven an element.
  static constexpr double free_pattern_roundings = 2;

  // By how much subtractions magnified the error of an element, at most.
  const Rough<T>& loss() const { return loss_; }

 private:
  void prepare_free(const StationPlan& station, const StationMode<T>& mode, bool majorant, int in, int out) {
    loss_ = Rough<T>(free_pattern_roundings);
    shared_ = false;
    alike_ = {false, false};
    for (std::size_t p = 0; p < 2; ++p) {
      elements_[p][0] =
          PatternElements<T>(mode.click[p], station.overlap[p][0], majorant, in, out).of(station.demands[p]);
    }
  }

  // outcome: 0 = c clicks, 1 = d clicks (without its sign (-1)^Delta), 2 = the sum of both.
  const Elements<T>& elements(std::size_t p, int outcome) const {
    return elements_[p][outcome == 1 && alike_[p] ? 0 : static_cast<std::size_t>(outcome)];
  }

  std::array<std::array<Elements<T>, 3>, 2> elements_;  // [polarisation][outcome]
  std::array<bool, 2> alike_{};
  bool shared_ = false;
  Rough<T> loss_ = Rough<T>(1.0);
};

}  // namespace heraldgauge::fast
