#include "reference/determinant/joint.hpp"

#include <algorithm>

#include "reference/determinant/silent_sums.hpp"

namespace heraldgauge::reference {
namespace {

using model::Ask;
using model::Chain;

std::vector<std::vector<WeightedPattern>> outcomes_of(const Chain& chain, HeraldSum sum) {
  std::vector<std::vector<WeightedPattern>> patterns;
  for (const model::Station& station : chain.stations) patterns.push_back(weighted_outcomes(station.herald, sum));
  return patterns;
}

template <class Number>
std::vector<EndBlock<Number>> all_end_blocks(const Field<Number>& field, const model::End& end, const model::Arm& arm) {
  std::vector<EndBlock<Number>> blocks;
  for (unsigned silent = 0; silent < 4; ++silent) blocks.push_back(end_block(field, end, arm, silent));
  return blocks;
}

template <class Number>
EndTable<Number> table_of_sum(const Field<Number>& field, const Chain& chain, HeraldSum sum, const EndAngles& angles) {
  const Ring<Number> ring(field, chain, outcomes_of(chain, sum));
  const auto sums = silent_sums(ring, all_end_blocks(field, chain.left_end, chain.left_arms.front()),
                                all_end_blocks(field, chain.right_end, chain.right_arms.back()),
                                angle_factors(effective_angles(chain, angles), field));
  const auto row = [&](std::size_t l) { return std::array{sums[l][0], sums[l][1], sums[l][2], sums[l][3]}; };
  return {exact_clicks(std::array{row(0), row(1), row(2), row(3)})};
}

std::size_t bits_exchanged(std::size_t clicks) { return (clicks & plus_bit) >> 1 | (clicks & cross_bit) << 1; }

// Even and odd numbers of psi- apart, (chain(O) +- chain(O'))/2, the odd part with the right end's bits exchanged.
template <class Number>
EndTable<Number> table_with_exchanged_bits(const Field<Number>& field, const Chain& chain, const EndAngles& angles) {
  const EndTable<Number> plain = table_of_sum(field, chain, HeraldSum::plain, angles);
  const EndTable<Number> alternating = table_of_sum(field, chain, HeraldSum::alternating, angles);
  const Number half = field(Rational(1, 2));
  EndTable<Number> recorded = plain;
  for (std::size_t l = 0; l < 4; ++l) {
    for (std::size_t r = 0; r < 4; ++r) {
      const std::size_t exchanged = bits_exchanged(r);
      Number even = field(0L), odd = field(0L);
      add(even, plain.joint[l][r], alternating.joint[l][r]);
      subtract(odd, plain.joint[l][exchanged], alternating.joint[l][exchanged]);
      add(recorded.joint[l][r], even, odd);
      multiply(recorded.joint[l][r], recorded.joint[l][r], half);
    }
  }
  return recorded;
}

// The silent sets of one end that a pattern needs, with their signs.
struct SignedSilentSet {
  unsigned silent;
  int sign;
};
std::vector<SignedSilentSet> silent_sets(const std::array<Ask, 2>& asks) {
  const unsigned bits[2] = {plus_bit, cross_bit};
  std::vector<SignedSilentSet> sets = {{0, 1}};
  for (std::size_t j = 0; j < asks.size(); ++j) {
    if (asks[j].kind == Ask::Kind::not_looked_at) continue;
    std::vector<SignedSilentSet> next;
    for (const SignedSilentSet& set : sets) {
      if (asks[j].kind == Ask::Kind::clicks) next.push_back(set);
      next.push_back({set.silent | bits[j], asks[j].kind == Ask::Kind::clicks ? -set.sign : set.sign});
    }
    sets = next;
  }
  return sets;
}

template <class Number>
std::vector<EndBlock<Number>> blocks_of(const Field<Number>& field, const model::End& end, const model::Arm& arm,
                                        const std::vector<SignedSilentSet>& sets) {
  std::vector<EndBlock<Number>> blocks;
  for (const SignedSilentSet& set : sets) blocks.push_back(end_block(field, end, arm, set.silent));
  return blocks;
}

}  // namespace

EndAngles angles_of(const Chain& chain, Basis basis) {
  switch (basis) {
    case Basis::rectilinear:
      return {0, 0};
    case Basis::diagonal:
      return {45, 45};
    case Basis::analyser:
      break;
  }
  return {chain.left_end.analyser_deg, chain.right_end.analyser_deg};
}

template <class Number>
EndTable<Number> joint_table(const Field<Number>& field, const Chain& chain, Basis basis) {
  const EndAngles angles = angles_of(chain, basis);
  const bool may_be_minus =
      std::any_of(chain.stations.begin(), chain.stations.end(),
                  [](const model::Station& station) { return station.herald != model::Herald::psi_plus; });
  // At 45 degrees, th -> -th is the exchange of two detectors; where they are alike the two corrections are the same.
  const bool alike = chain.right_end.detectors[model::plus] == chain.right_end.detectors[model::cross];
  if (basis == Basis::diagonal && may_be_minus && !alike) return table_with_exchanged_bits(field, chain, angles);
  return table_of_sum(field, chain, HeraldSum::corrected, angles);
}

template <class Number>
Number herald_probability(const Field<Number>& field, const Chain& chain) {
  if (chain.station_count() == 0) return field(1L);
  const Ring<Number> ring(field, chain, outcomes_of(chain, HeraldSum::corrected));
  const std::vector left = {end_block(field, chain.left_end, chain.left_arms.front(), 0)};
  const std::vector right = {end_block(field, chain.right_end, chain.right_arms.back(), 0)};
  return silent_sums(ring, left, right, angle_factors(EndAngles{0, 0}, field))[0][0];
}

template <class Number>
Number pattern_probability(const Field<Number>& field, const Chain& chain, const model::Pattern& pattern) {
  std::vector<std::vector<WeightedPattern>> stations;
  for (const auto& asks : pattern.stations) stations.push_back({WeightedPattern{asks}});
  const Ring<Number> ring(field, chain, stations);
  const auto left = silent_sets(pattern.left);
  const auto right = silent_sets(pattern.right);
  const auto sums = silent_sums(ring, blocks_of(field, chain.left_end, chain.left_arms.front(), left),
                                blocks_of(field, chain.right_end, chain.right_arms.back(), right),
                                angle_factors(effective_angles(chain, angles_of(chain, Basis::analyser)), field));
  Number total = field(0L);
  for (std::size_t l = 0; l < left.size(); ++l) {
    for (std::size_t r = 0; r < right.size(); ++r) {
      if (left[l].sign * right[r].sign > 0) {
        add(total, total, sums[l][r]);
      } else {
        subtract(total, total, sums[l][r]);
      }
    }
  }
  return total;
}

template EndTable<Interval> joint_table(const Field<Interval>&, const Chain&, Basis);
template EndTable<Rational> joint_table(const Field<Rational>&, const Chain&, Basis);
template Interval herald_probability(const Field<Interval>&, const Chain&);
template Rational herald_probability(const Field<Rational>&, const Chain&);
template Interval pattern_probability(const Field<Interval>&, const Chain&, const model::Pattern&);
template Rational pattern_probability(const Field<Rational>&, const Chain&, const model::Pattern&);

}  // namespace heraldgauge::reference
