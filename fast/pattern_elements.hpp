#pragma once
// Elements of a station's operator for one polarisation where a free pattern says what its two detectors do, in the
// basis of station_elements.hpp. Written out as differences, so that what cannot happen is 0 exactly; some terms have
// either sign, and `majorant` gives what all of them come to in size.

#include "fast/plan.hpp"
#include "fast/station_elements.hpp"

namespace heraldgauge::fast {

// What a pattern's elements are made of: S_c has c silent and d not looked at, S both silent, C = S_d - S has d silent
// and a photon registered at c.
template <class T>
class PatternElements {
 public:
  // click: c clicks, d clicks; overlap: of the first.
  PatternElements(const std::array<ClickMode<T>, 2>& click, Overlap overlap, bool majorant, int in, int out)
      : c_(click[0]), d_(click[1]), in_(in), out_(out) {
    sign_ = majorant ? 1.0 : -1.0;
    const bool positive = overlap == Overlap::positive || overlap == Overlap::zero;
    both_silent_ = second_quantised(c_.a0, c_.b0, T(positive ? 1.0 : sign_) * c_.x0, in, out);
  }

  Elements<T> of(const std::array<Demand, 2>& demands) const {
    const auto [c, d] = demands;
    if (c == Demand::silent && d == Demand::silent) return scaled(both_silent_, d_.live * c_.live);
    if (c == Demand::clicks && d == Demand::clicks) return both_click();
    if (c == Demand::clicks && d == Demand::silent) return scaled(sum(c_alone(), c_.dark), c_.live);
    if (c == Demand::silent && d == Demand::clicks) return scaled(sum(d_alone(), d_.dark), d_.live);
    if (d == Demand::silent) return scaled(d_silent(), c_.live);
    if (c == Demand::silent) return scaled(c_silent(), d_.live);
    if (c == Demand::clicks) return clicks(c_silent(), k_of_c(), c_.dark);
    if (d == Demand::clicks) return clicks(d_silent(), k_of_d(), d_.dark);
    return identity();
  }

 private:
  struct Coupling {
    T kr, kl, z;
  };
  // K of a detector: an arriving photon registers.
  Coupling k_of_c() const { return {c_.click_r, c_.click_l, d_.x1}; }
  Coupling k_of_d() const { return {d_.click_r, d_.click_l, T(sign_) * c_.x1}; }

  Elements<T> identity() const { return second_quantised(T(1.0), T(1.0), T(0.0), in_, out_); }
  Elements<T> d_silent() const { return second_quantised(c_.a1, c_.b1, c_.x1, in_, out_); }
  Elements<T> c_silent() const { return second_quantised(d_.a1, d_.b1, T(sign_) * d_.x1, in_, out_); }

  // S_d - S and S_c - S.
  Elements<T> c_alone() const {
    const Coupling k = k_of_c();
    return difference(both_silent_, c_.a1, c_.b1, c_.x1, k.kr, k.kl, k.z);
  }
  Elements<T> d_alone() const {
    const Coupling k = k_of_d();
    return difference(both_silent_, d_.a1, d_.b1, T(sign_) * d_.x1, k.kr, k.kl, k.z);
  }

  // 1 - S_c - S_d + S, and dark events for either click or both.
  Elements<T> both_click() const {
    const Elements<T> c = c_alone();
    const Elements<T> d = d_alone();
    const Coupling kc = k_of_c();
    const Coupling kd = k_of_d();
    Elements<T> both =
        difference<T, 2>(T(1.0), T(1.0), T(0.0), {Addend<T>{d, kc.kr, kc.kl, kc.z}, Addend<T>{c, kd.kr, kd.kl, kd.z}});
    both.add_scaled(c_.dark, d);
    both.add_scaled(d_.dark, c);
    both.add_scaled(c_.dark * d_.dark, both_silent_);
    return both;
  }

  // The other detector not looked at: 1 - (1-dark) S.
  Elements<T> clicks(const Elements<T>& silent, const Coupling& k, const T& dark) const {
    Elements<T> result = difference(silent, T(1.0), T(1.0), T(0.0), k.kr, k.kl, k.z);
    result.add_scaled(dark, silent);
    return result;
  }

  Elements<T> sum(Elements<T> photons, const T& dark) const {
    photons.add_scaled(dark, both_silent_);
    return photons;
  }
  static Elements<T> scaled(const Elements<T>& elements, const T& factor) {
    Elements<T> result(elements.in(), elements.out());
    result.add_scaled(factor, elements);
    return result;
  }

  const ClickMode<T>& c_;
  const ClickMode<T>& d_;
  int in_;
  int out_;
  double sign_;
  Elements<T> both_silent_;
};

}  // namespace heraldgauge::fast
