#include "reference/pair_number/profile.hpp"

#include "reference/optics/angles.hpp"
#include "reference/pair_number/certified_tail.hpp"
#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

constexpr model::Ask clicks{model::Ask::Kind::clicks};
constexpr model::Ask silent{model::Ask::Kind::silent};

// Adds X_D(a, b) times i^D sum_q h_q e^(i q phi) for Delta and -Delta: a cosine sum for even D, a sine sum for odd D.
void add_element(AngularProfile& profile, const Interval& weight, long sector, long pairs, const Interval* harmonics) {
  std::vector<Interval>& target = sector % 2 == 0 ? profile.cosine : profile.sine;
  const bool negative = (sector + sector % 2) / 2 % 2 != 0;  // i^D, or i^(D+1) for the sines
  const long sectors = sector == 0 ? 1 : 2;
  Interval scratch(weight.precision());
  for (long q = sector % 2; q <= pairs; ++q) {
    Interval::multiply(scratch, weight, harmonics[q]);
    mpfi_mul_si(scratch.raw(), scratch.raw(), (negative ? -sectors : sectors) * (q == 0 ? 1 : 2));
    Interval& sum = target[static_cast<std::size_t>(q)];
    Interval::add(sum, sum, scratch);
  }
}

}  // namespace

AngularProfile pair_number_profile(const HeraldedChain& link, const Accuracy& accuracy) {
  const Precision bits = accuracy.bits;
  const EndAsk ask{clicks, silent};
  const model::Rational left = effective_angles(link.chain, {link.chain.left_end.analyser_deg, 0}).left_deg;
  const CertifiedTail tail = certified_tail(link, {ask}, {ask}, accuracy.log2_tail);
  const long sectors = keeps_polarisations(link.left_end(), ask, left) ? 0 : sectors_within(tail.cutoffs);
  std::vector<SectorStack> states{
      end_elements(link.left_end(), Side::left, ask, left, tail.cutoffs.front(), sectors, bits)};
  states = contract_stations(link, tail.cutoffs, Strings::corrected, std::move(states), bits);

  const long cut = tail.cutoffs.back();
  const std::vector<Interval> zeros(static_cast<std::size_t>(cut + 1), Interval(bits));
  AngularProfile profile{zeros, zeros, {Interval(bits), Interval(bits), Interval(bits)}, tail.largest, tail.cutoffs};
  for_each_turning_element(link.right_end(), ask, cut, sectors, bits,
                           [&](long sector, long a, long b, const Interval* harmonics) {
                             const Interval& weight = states.front()[static_cast<std::size_t>(sector)](a, b);
                             add_element(profile, weight, sector, a + b + sector, harmonics);
                           });
  return profile;
}

}  // namespace heraldgauge::reference::pair_number
