#include "reference/pair_number/profile.hpp"

#include <algorithm>

#include "reference/pair_number/certified_tail.hpp"
#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

constexpr model::Ask clicks{model::Ask::Kind::clicks};
constexpr model::Ask silent{model::Ask::Kind::silent};

// sum_q c_q cos(q phi) + s_q sin(q phi)
struct FourierSum {
  std::vector<Interval> cosines, sines;

  Jet at(const Interval& phi, Precision bits) const {
    Jet jet{Interval(bits), Interval(bits), Interval(bits)};
    for (std::size_t q = 0; q < cosines.size(); ++q) {
      const long order = static_cast<long>(q);
      const Interval cos_q = cosine(phi * order);
      const Interval sin_q = sine(phi * order);
      const Interval value = cosines[q] * cos_q + sines[q] * sin_q;
      jet.value += value;
      jet.first += (sines[q] * cos_q - cosines[q] * sin_q) * order;
      jet.second -= value * order * order;
    }
    return jet;
  }
  bool is_exactly_constant() const {
    const auto zero = [](const Interval& coefficient) { return coefficient.is_exactly_zero(); };
    return std::all_of(cosines.begin() + 1, cosines.end(), zero) && std::all_of(sines.begin() + 1, sines.end(), zero);
  }
};

// Both contain the value.
Interval common_part(const Interval& a, const Interval& b) {
  Interval result(a.precision());
  mpfi_intersect(result.raw(), a.raw(), b.raw());
  return result;
}

class FourierProfile : public AngularProfile {
 public:
  FourierProfile(FourierSum sum, CertifiedTail tail, Precision bits, bool constant)
      : sum_(std::move(sum)), tail_(std::move(tail)), bits_(bits), constant_(constant) {}

  // Directly, and by the mean value theorem about the middle; the derivative likewise.
  Jet at(const Interval& phi) const override {
    Interval angle(bits_);
    mpfi_set(angle.raw(), phi.raw());
    const Interval middle = midpoint(angle);
    const Interval offset = angle - middle;
    Jet jet = sum_.at(angle, bits_);
    const Jet centre = sum_.at(middle, bits_);
    jet.first = common_part(jet.first, centre.first + jet.second * offset);
    jet.value = common_part(jet.value, centre.value + jet.first * offset);
    return jet;
  }
  Interval tail() const override { return tail_.largest; }
  std::vector<long> cutoff() const override { return tail_.cutoffs; }
  bool is_constant() const override { return constant_; }

 private:
  FourierSum sum_;
  CertifiedTail tail_;
  Precision bits_;
  bool constant_;
};

FourierSum contracted(const HeraldedChain& link, const SectorStack& state, const EndAsk& ask, long cut, Precision bits) {
  const std::vector<Interval> zeros(static_cast<std::size_t>(cut + 1), Interval(bits));
  FourierSum sum{zeros, zeros};
  Interval scratch(bits);
  for_each_turning_element(
      link.right_end(), ask, cut, static_cast<long>(state.size()) - 1, bits,
      [&](long sector, long a, long b, const Interval* harmonics) {
        std::vector<Interval>& target = sector % 2 == 0 ? sum.cosines : sum.sines;
        const bool negative = (sector + sector % 2) / 2 % 2 != 0;  // i^D, or i^(D+1) for the sines
        const long pairs = sector == 0 ? 1 : 2;                    // Delta and -Delta
        const Interval& weight = state[static_cast<std::size_t>(sector)](a, b);
        for (long q = sector % 2; q <= a + b + sector; ++q) {
          Interval::multiply(scratch, weight, harmonics[q]);
          mpfi_mul_si(scratch.raw(), scratch.raw(), (negative ? -pairs : pairs) * (q == 0 ? 1 : 2));
          Interval::add(target[static_cast<std::size_t>(q)], target[static_cast<std::size_t>(q)], scratch);
        }
      });
  return sum;
}

bool registers_nothing(const EndPlace& place) {
  return place.transmittance.is_zero() || (place.end.detectors[0].registering_probability().is_zero() &&
                                           place.end.detectors[1].registering_probability().is_zero());
}

// No photon ever reaches the right detectors, or, without a station, the left ones, which leaves the right end unpolarised.
bool cannot_turn(const HeraldedChain& link) {
  return registers_nothing(link.right_end()) || link.chain.sources.back().pair_parameter.is_zero() ||
         (link.station_count() == 0 && registers_nothing(link.left_end()));
}

}  // namespace

std::unique_ptr<AngularProfile> make_profile(const HeraldedChain& link, const Accuracy& accuracy) {
  const EndAsk ask{clicks, silent};
  const model::Rational& left_degrees = link.chain.left_end.analyser_deg;
  CertifiedTail tail = certified_tail(link, {ask}, {ask}, accuracy.log2_tail);
  const long sectors = keeps_polarisations(link.left_end(), ask, left_degrees) ? 0 : sectors_within(tail.cutoffs);
  std::vector<SectorStack> states{
      end_elements(link.left_end(), Side::left, ask, left_degrees, tail.cutoffs.front(), sectors, accuracy.bits)};
  states = contract_stations(link, tail.cutoffs, Strings::corrected, std::move(states), accuracy.bits);
  FourierSum sum = contracted(link, states.front(), ask, tail.cutoffs.back(), accuracy.bits);
  const bool constant = cannot_turn(link) || (sum.is_exactly_constant() && tail.largest.is_exactly_zero());
  return std::make_unique<FourierProfile>(std::move(sum), std::move(tail), accuracy.bits, constant);
}

}  // namespace heraldgauge::reference::pair_number
