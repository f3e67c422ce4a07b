#include "reference/determinant/end_block.hpp"

#include "reference/optics/dark_events.hpp"

namespace heraldgauge::reference {

using model::Real;

template <class Number>
EndBlock<Number> end_block(const Field<Number>& field, const model::End& end, const model::Arm& arm, unsigned silent) {
  const auto registered = [&](model::EndDetector j, unsigned bit) {
    return (silent & bit) != 0 ? end.detectors[j].registering_probability() * arm.transmittance : Real(0);
  };
  const Real p = registered(model::plus, plus_bit);
  const Real c = registered(model::cross, cross_bit);
  const unsigned mask =
      ((silent & plus_bit) != 0 ? 1U << model::plus : 0U) | ((silent & cross_bit) != 0 ? 1U << model::cross : 0U);
  return {field(Real(1) - (p + c) / Real(2)), field((p - c) / Real(2)), field((Real(1) - p) * (Real(1) - c)),
          no_dark_event(field, end.detectors, end.background, mask)};
}

template <class Number>
std::array<std::array<Number, 4>, 4> exact_clicks(const std::array<std::array<Number, 4>, 4>& silent) {
  auto sums = silent;
  // After the step for a bit, an index with that bit set means "clicks": not looked at minus silent.
  const auto step = [](Number& without, Number& with) {
    const Number silent_value = with;
    subtract(with, without, silent_value);
    without = silent_value;
  };
  for (const unsigned bit : {plus_bit, cross_bit}) {
    for (unsigned i = 0; i < 4; ++i) {
      for (unsigned j = 0; j < 4; ++j) {
        if ((i & bit) == 0) step(sums[i][j], sums[i | bit][j]);
      }
    }
    for (unsigned i = 0; i < 4; ++i) {
      for (unsigned j = 0; j < 4; ++j) {
        if ((j & bit) == 0) step(sums[i][j], sums[i][j | bit]);
      }
    }
  }
  return sums;
}

template EndBlock<Interval> end_block(const Field<Interval>&, const model::End&, const model::Arm&, unsigned);
template EndBlock<Rational> end_block(const Field<Rational>&, const model::End&, const model::Arm&, unsigned);
template std::array<std::array<Interval, 4>, 4> exact_clicks(const std::array<std::array<Interval, 4>, 4>&);
template std::array<std::array<Rational, 4>, 4> exact_clicks(const std::array<std::array<Rational, 4>, 4>&);

}  // namespace heraldgauge::reference
