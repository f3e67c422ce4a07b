#include "reference/determinant/station_terms.hpp"

#include <algorithm>
#include <map>

#include "reference/optics/dark_events.hpp"

namespace heraldgauge::reference {
namespace {

using model::Ask;
using model::Real;
using model::Station;

// Registering probabilities of the silent c and d detectors of one polarisation. Exchanging the two changes only the
// sign of the off-diagonal, so they are kept in one order and the sign beside them.
struct SilentPair {
  Real c, d;
  friend bool operator==(const SilentPair&, const SilentPair&) = default;
};

SilentPair silent_pair(const Station& station, std::size_t c, std::size_t d, unsigned silent) {
  const auto registering = [&](std::size_t j) {
    return (silent >> j & 1U) != 0 ? station.detectors[j].registering_probability() : Real(0);
  };
  return {registering(c), registering(d)};
}

struct BlockReference {
  std::size_t index;
  int sign;  // of x: +1 as stored, -1 with c and d exchanged, 0 where they are equal
};

// The distinct blocks met so far.
class BlockList {
 public:
  BlockReference find_or_add(const SilentPair& pair) {
    const int sign = pair.c == pair.d ? 0 : 1;
    for (std::size_t i = 0; i < pairs_.size(); ++i) {
      if (pairs_[i] == pair) return {i, sign};
      if (pairs_[i] == SilentPair{pair.d, pair.c}) return {i, -sign};
    }
    pairs_.push_back(pair);
    return {pairs_.size() - 1, sign};
  }
  const std::vector<SilentPair>& pairs() const { return pairs_; }

 private:
  std::vector<SilentPair> pairs_;
};

struct TermKey {
  std::size_t h, v;
  int kappa_sign;
  auto operator<=>(const TermKey&) const = default;
};

using SilentSets = std::map<unsigned, long>;  // how often each set enters a merged term

struct Expansion {
  BlockList h, v;
  std::map<TermKey, SilentSets> terms;
};

unsigned mask_of(const WeightedPattern& pattern, Ask::Kind kind) {
  unsigned mask = 0;
  for (std::size_t j = 0; j < pattern.detectors.size(); ++j) {
    if (pattern.detectors[j].kind == kind) mask |= 1U << j;
  }
  return mask;
}

void expand(Expansion& expansion, const Station& station, const WeightedPattern& pattern) {
  const unsigned clicking = mask_of(pattern, Ask::Kind::clicks);
  const unsigned always_silent = mask_of(pattern, Ask::Kind::silent);
  for (unsigned subset = clicking;; subset = (subset - 1) & clicking) {
    const unsigned silent = subset | always_silent;
    const BlockReference h = expansion.h.find_or_add(silent_pair(station, model::cH, model::dH, silent));
    const BlockReference v = expansion.v.find_or_add(silent_pair(station, model::cV, model::dV, silent));
    const int kappa_sign = h.sign * v.sign * (pattern.reverses_v ? -1 : 1);
    const int parity = __builtin_popcount(subset) % 2 == 0 ? 1 : -1;
    expansion.terms[{h.index, v.index, kappa_sign}][silent] += parity * pattern.weight;
    if (subset == 0) return;
  }
}

Expansion expand_all(const Station& station, const std::vector<WeightedPattern>& patterns) {
  Expansion expansion;
  for (const WeightedPattern& pattern : patterns) expand(expansion, station, pattern);
  std::erase_if(expansion.terms, [](const auto& term) {
    return std::all_of(term.second.begin(), term.second.end(), [](const auto& set) { return set.second == 0; });
  });
  return expansion;
}

// What the blocks of one station have in common.
template <class Number>
struct Inputs {
  const Field<Number>& field;
  const Real& t_r;
  const Real& t_l;
  const Real& v;
};

template <class Number>
StationBlock<Number> block(const Inputs<Number>& in, const SilentPair& pair) {
  const Real half_sum = (pair.c + pair.d) / Real(2);
  const Real difference = pair.c - pair.d;
  const Number r = in.field(Real(1) - half_sum * in.t_r);
  const Number l = in.field(Real(1) - half_sum * in.t_l);
  Number determinant = in.field(0L);
  multiply(determinant, r, l);
  subtract(determinant, determinant, in.field(difference * difference * in.t_r * in.t_l * in.v / Real(4)));
  return {r, l, determinant};
}

template <class Number>
Number coefficient(const Field<Number>& field, const Station& station, const SilentSets& sets) {
  Number sum = field(0L);
  for (const auto& [silent, count] : sets) {
    Number part = no_dark_event(field, station.detectors, station.background, silent);
    multiply(part, part, field(count));
    add(sum, sum, part);
  }
  return sum;
}

}  // namespace

std::vector<WeightedPattern> weighted_outcomes(model::Herald herald, HeraldSum sum) {
  std::vector<WeightedPattern> patterns;
  for (const model::AcceptedOutcome& outcome : model::accepted_outcomes(herald)) {
    const bool negative = outcome.minus && sum == HeraldSum::alternating;
    patterns.push_back({outcome.detectors, negative ? -1 : 1, outcome.minus && sum == HeraldSum::corrected});
  }
  return patterns;
}

template <class Number>
StationTerms<Number> station_terms(const Field<Number>& field, const Station& station,
                                   const model::Arm& right_arm_before, const model::Arm& left_arm_behind,
                                   const std::vector<WeightedPattern>& patterns) {
  const Expansion expansion = expand_all(station, patterns);
  const Inputs<Number> in{field, right_arm_before.transmittance, left_arm_behind.transmittance,
                          station.indistinguishability};
  StationTerms<Number> result;
  for (const SilentPair& pair : expansion.h.pairs()) result.h_blocks.push_back(block(in, pair));
  for (const SilentPair& pair : expansion.v.pairs()) result.v_blocks.push_back(block(in, pair));
  for (const auto& [key, sets] : expansion.terms) {
    const SilentPair& h = expansion.h.pairs()[key.h];
    const SilentPair& v = expansion.v.pairs()[key.v];
    const Real kappa = Real(key.kappa_sign) * (h.c - h.d) * (v.c - v.d) * in.t_r * in.t_l * in.v / Real(4);
    result.terms.push_back({key.h, key.v, coefficient(field, station, sets), field(kappa)});
  }
  return result;
}

std::size_t count_station_terms(const Station& station, const std::vector<WeightedPattern>& patterns) {
  return expand_all(station, patterns).terms.size();
}

template StationTerms<Interval> station_terms(const Field<Interval>&, const Station&, const model::Arm&,
                                              const model::Arm&, const std::vector<WeightedPattern>&);
template StationTerms<Rational> station_terms(const Field<Rational>&, const Station&, const model::Arm&,
                                              const model::Arm&, const std::vector<WeightedPattern>&);

}  // namespace heraldgauge::reference
