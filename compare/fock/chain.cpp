#include "compare/fock/chain.hpp"

#include <algorithm>
#include <memory>

#include "reference/determinant/joint.hpp"

namespace heraldgauge::compare::fock {
namespace {

using model::Ask;
using reference::Basis;
using reference::EndTable;

bool is_zero(const Interval& x) { return x.is_exactly_zero(); }
template <class Number>
bool is_zero(const Number& x) {
  return x == 0;
}

Ask asked(bool click) { return {click ? Ask::Kind::clicks : Ask::Kind::silent}; }
std::array<Ask, 2> end_asks(std::size_t clicks) { return {asked((clicks & 2) != 0), asked((clicks & 1) != 0)}; }

bool is_right_angle(const Rational& degrees) { return Rational(degrees / 90).get_den() == 1; }

std::size_t bits_exchanged(std::size_t clicks) { return clicks >> 1 | (clicks & 1) << 1; }

bool operator==(const StationShape& a, const StationShape& b) {
  return a.right_transmittance == b.right_transmittance && a.left_transmittance == b.left_transmittance &&
         a.indistinguishability == b.indistinguishability && a.right_cut == b.right_cut && a.left_cut == b.left_cut &&
         a.sectors == b.sectors;
}

template <class Number>
Sectors<Number> zero_sectors(const Arithmetic<Number>& number, long cut, long sectors) {
  Sectors<Number> result;
  for (long delta = 0; delta <= sectors; ++delta) result.emplace_back(cut - delta + 1, cut - delta + 1, number(0L));
  return result;
}

}  // namespace

template <class Number>
Chain<Number>::Chain(const Arithmetic<Number>& number, const Description& description)
    : number_(number),
      description_(description),
      left_loss_(number, description.chain.left_arms.front().transmittance),
      right_loss_(number, description.chain.right_arms.back().transmittance) {
  const model::Chain& chain = description_.chain;
  for (std::size_t k = 0; k < chain.station_count(); ++k) {
    interference_.push_back(number_(chain.right_arms[k].transmittance * chain.left_arms[k + 1].transmittance *
                                    chain.stations[k].indistinguishability));
  }
  for (const auto& weights : description_.weights) {
    std::vector<Number> values;
    for (const model::Real& weight : weights) values.push_back(number_(weight));
    weights_.push_back(std::move(values));
  }
}

template <class Number>
long Chain<Number>::most_sectors() const {
  long most = cut(0);
  for (std::size_t k = 1; k < weights_.size(); ++k) most = std::min(most, cut(k));
  return most;
}

template <class Number>
Sectors<Number> Chain<Number>::end_sectors(const model::End& end, const Loss<Number>& loss, std::size_t source,
                                           const Ask2& asks, const Direction<Number>& along, long sectors) const {
  const auto answer = [&](std::size_t j) {
    return behind_loss(number_, loss,
                       response(number_, end.detectors[j], asks[j], description_.rule, ClickPart::whole, cut(source)));
  };
  return end_part(number_, along, answer(model::plus), answer(model::cross), cut(source), sectors);
}

// Adds weights and the roots of factorials, and sorts by the total number of pairs where that is asked for.
template <class Number>
void Chain<Number>::add_weighted(State& out, std::size_t total, std::size_t source,
                                 const Sectors<Number>& unweighted) const {
  const long most = cut(source);
  const long per_mode = description_.most_per_mode.value_or(most);
  std::vector<Number> inverse_factorial{number_(1L)};
  for (long n = 1; n <= most; ++n) inverse_factorial.push_back(inverse_factorial.back() * number_(Rational(1, n)));
  const auto inverse = [&](long n) -> const Number& { return inverse_factorial[static_cast<std::size_t>(n)]; };
  for (std::size_t sector = 0; sector < unweighted.size(); ++sector) {
    const auto delta = static_cast<long>(sector);
    for (long a = 0; a + delta <= std::min(most, per_mode); ++a) {
      for (long b = 0; a + b + delta <= most && b + delta <= per_mode; ++b) {
        const Number& before = unweighted[sector](a, b);
        const auto pairs = static_cast<std::size_t>(a + b + delta);
        if (is_zero(before) || is_zero(weights_[source][pairs])) continue;
        const bool graded = description_.by_total_pairs || description_.most_total;
        const std::size_t target = graded ? total + pairs : 0;
        if (description_.most_total && target > static_cast<std::size_t>(*description_.most_total)) continue;
        while (out.size() <= target) {
          out.push_back(zero_sectors(number_, most, static_cast<long>(unweighted.size()) - 1));
        }
        Number& sum = out[target][sector](a, b);
        sum =
            sum + before * weights_[source][pairs] * inverse(a) * inverse(a + delta) * inverse(b) * inverse(b + delta);
      }
    }
  }
}

template <class Number>
typename Chain<Number>::State Chain<Number>::first_state(const Ask2& left, const Rational& degrees,
                                                         long sectors) const {
  State state;
  add_weighted(state, 0, 0,
               end_sectors(description_.chain.left_end, left_loss_, 0, left, direction(number_, degrees), sectors));
  return state;
}

template <class Number>
const typename Chain<Number>::Part& Chain<Number>::part(std::size_t k, std::size_t polarisation, const Outcome& outcome,
                                                        ClickPart click, long sectors) const {
  const model::Chain& chain = description_.chain;
  const model::Station& station = chain.stations[k];
  const StationShape shape{chain.right_arms[k].transmittance,
                           chain.left_arms[k + 1].transmittance,
                           station.indistinguishability,
                           cut(k),
                           cut(k + 1),
                           sectors};
  const std::array detectors{station.detectors[polarisation], station.detectors[polarisation + 2]};
  const Ask2 asks{outcome.asks[polarisation], outcome.asks[polarisation + 2]};
  for (const auto& known : parts_) {
    if (known->shape == shape && known->detectors == detectors && known->asks == asks && known->click == click) {
      return *known;
    }
  }
  const long most = shape.right_cut + shape.left_cut;
  const auto answer = [&](std::size_t j) {
    return response(number_, detectors[j], asks[j], description_.rule, click, most);
  };
  parts_.push_back(
      std::make_unique<Part>(Part{shape, detectors, asks, click, station_part(number_, shape, answer(0), answer(1))}));
  return *parts_.back();
}

// out(c, d) += factor(D) sum_{a,b} H(a, c) X(a, b) V(b, d).
template <class Number>
void Chain<Number>::add_product(Sectors<Number>& out, const Sectors<Number>& state, const Part& h, const Part& v,
                                const std::function<Number(long)>& factor) const {
  for (std::size_t sector = 0; sector < out.size(); ++sector) {
    const Matrix<Number>&x = state[sector], &horizontal = h.sectors[sector], &vertical = v.sectors[sector];
    Matrix<Number> half(horizontal.columns(), x.columns(), number_(0L));
    for (long a = 0; a < x.rows(); ++a) {
      for (long b = 0; a + b < x.rows(); ++b) {
        if (is_zero(x(a, b))) continue;
        for (long c = 0; c < half.rows(); ++c) half(c, b) = half(c, b) + horizontal(a, c) * x(a, b);
      }
    }
    const Number common = factor(static_cast<long>(sector));
    for (long c = 0; c < out[sector].rows(); ++c) {
      for (long d = 0; c + d < out[sector].rows(); ++d) {
        Number sum = number_(0L);
        for (long b = 0; b < half.columns(); ++b) sum = sum + half(c, b) * vertical(b, d);
        out[sector](c, d) = out[sector](c, d) + common * sum;
      }
    }
  }
}

template <class Number>
Sectors<Number> Chain<Number>::through_station(std::size_t k, const Sectors<Number>& state,
                                               const std::vector<Outcome>& outcomes, Minus minus) const {
  const auto sectors = static_cast<long>(state.size()) - 1;
  const auto interference = powers(number_, interference_[k], sectors);
  auto out = zero_sectors(number_, cut(k + 1), sectors);
  for (const Outcome& outcome : outcomes) {
    const auto factor = [&](long sign, long delta) {
      const bool odd = minus == Minus::corrected && delta % 2 != 0;
      const bool negative = outcome.minus && (odd || minus == Minus::negative);
      return Number(number_(negative ? -sign : sign) * interference[static_cast<std::size_t>(delta)]);
    };
    const auto add = [&](ClickPart click, long sign) {
      add_product(out, state, part(k, model::cH, outcome, click, sectors), part(k, model::cV, outcome, click, sectors),
                  [&](long delta) { return factor(sign, delta); });
    };
    add(ClickPart::whole, 1);
    if (!description_.with_double_dark) add(ClickPart::dark_only, -1);
  }
  return out;
}

template <class Number>
typename Chain<Number>::State Chain<Number>::contracted(State state, const std::vector<std::vector<Outcome>>& outcomes,
                                                        Minus minus, long) const {
  for (std::size_t k = 0; k < outcomes.size(); ++k) {
    State next;
    for (std::size_t total = 0; total < state.size(); ++total) {
      add_weighted(next, total, k + 1, through_station(k, state[total], outcomes[k], minus));
    }
    state = std::move(next);
  }
  return state;
}

template <class Number>
std::vector<Number> Chain<Number>::closed(const State& state, const Sectors<Number>& right) const {
  std::vector<Number> result;
  for (const Sectors<Number>& sectors : state) {
    Number sum = number_(0L);
    for (std::size_t sector = 0; sector < sectors.size(); ++sector) {
      Number part = number_(0L);
      for (long a = 0; a < sectors[sector].rows(); ++a) {
        for (long b = 0; a + b < sectors[sector].rows(); ++b) {
          part = part + sectors[sector](a, b) * right[sector](a, b);
        }
      }
      sum = sum + part * number_(sector == 0 ? 1L : 2L);
    }
    result.push_back(sum);
  }
  if (result.empty()) result.push_back(number_(0L));
  if (description_.by_total_pairs) return result;
  for (std::size_t total = 1; total < result.size(); ++total) result[0] = result[0] + result[total];
  return {result[0]};
}

template <class Number>
std::vector<std::vector<typename Chain<Number>::Outcome>> Chain<Number>::accepted() const {
  std::vector<std::vector<Outcome>> all;
  for (const model::Station& station : description_.chain.stations) {
    std::vector<Outcome> outcomes;
    for (const model::AcceptedOutcome& outcome : model::accepted_outcomes(station.herald)) {
      outcomes.push_back({outcome.detectors, outcome.minus});
    }
    all.push_back(std::move(outcomes));
  }
  return all;
}

template <class Number>
std::vector<Number> Chain<Number>::herald() const {
  const model::Chain& chain = description_.chain;
  if (chain.station_count() == 0 && !description_.by_total_pairs) return {number_(1L)};
  const auto right = end_sectors(chain.right_end, right_loss_, chain.station_count(), {}, direction(number_, 0), 0);
  return closed(contracted(first_state({}, 0, 0), accepted(), Minus::plain, 0), right);
}

template <class Number>
std::vector<Number> Chain<Number>::pattern(const model::Pattern& pattern) const {
  const model::Chain& chain = description_.chain;
  std::vector<std::vector<Outcome>> outcomes;
  for (const auto& asks : pattern.stations) outcomes.push_back({Outcome{asks, false}});
  const long sectors = most_sectors();
  const auto right = end_sectors(chain.right_end, right_loss_, chain.station_count(), pattern.right,
                                 direction(number_, chain.right_end.analyser_deg), sectors);
  return closed(
      contracted(first_state(pattern.left, chain.left_end.analyser_deg, sectors), outcomes, Minus::plain, sectors),
      right);
}

template <class Number>
std::vector<EndTable<Number>> Chain<Number>::tables(const Rational& left, const Rational& right, Minus minus) const {
  const model::Chain& chain = description_.chain;
  const long sectors = is_right_angle(left) || is_right_angle(right) ? 0 : most_sectors();
  std::vector<EndTable<Number>> tables;
  const auto entry = [&](std::size_t total, std::size_t l, std::size_t r) -> Number& {
    while (tables.size() <= total) {
      EndTable<Number> empty{{{{number_(0L), number_(0L), number_(0L), number_(0L)},
                               {number_(0L), number_(0L), number_(0L), number_(0L)},
                               {number_(0L), number_(0L), number_(0L), number_(0L)},
                               {number_(0L), number_(0L), number_(0L), number_(0L)}}}};
      tables.push_back(std::move(empty));
    }
    return tables[total].joint[l][r];
  };
  std::array<Sectors<Number>, 4> right_parts;
  for (std::size_t r = 0; r < 4; ++r) {
    right_parts[r] = end_sectors(chain.right_end, right_loss_, chain.station_count(), end_asks(r),
                                 direction(number_, right), sectors);
  }
  for (std::size_t l = 0; l < 4; ++l) {
    const State state = contracted(first_state(end_asks(l), left, sectors), accepted(), minus, sectors);
    for (std::size_t r = 0; r < 4; ++r) {
      const auto values = closed(state, right_parts[r]);
      for (std::size_t total = 0; total < values.size(); ++total) entry(total, l, r) = values[total];
    }
  }
  return tables;
}

// For the diagonal basis with unlike right detectors, even and odd numbers of psi- apart: (plain +- negative)/2, the
// odd part with the right end's bits exchanged.
template <class Number>
std::vector<EndTable<Number>> Chain<Number>::ends(Basis basis) const {
  const model::Chain& chain = description_.chain;
  const auto angles = reference::angles_of(chain, basis);
  const auto& detectors = chain.right_end.detectors;
  if (basis != Basis::diagonal || detectors[model::plus] == detectors[model::cross]) {
    return tables(angles.left_deg, angles.right_deg, Minus::corrected);
  }
  auto recorded = tables(angles.left_deg, angles.right_deg, Minus::plain);
  const auto negative = tables(angles.left_deg, angles.right_deg, Minus::negative);
  const Number half = number_(Rational(1, 2));
  for (std::size_t total = 0; total < recorded.size(); ++total) {
    const EndTable<Number> plain = recorded[total];
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) {
        const std::size_t x = bits_exchanged(r);
        const Number even = plain.joint[l][r] + negative[total].joint[l][r];
        const Number odd = plain.joint[l][x] - negative[total].joint[l][x];
        recorded[total].joint[l][r] = Number(even + odd) * half;
      }
    }
  }
  return recorded;
}

template <class Number>
std::vector<std::vector<Number>> Chain<Number>::coincidences(const std::vector<Rational>& right_deg) const {
  const model::Chain& chain = description_.chain;
  const long sectors = is_right_angle(chain.left_end.analyser_deg) ? 0 : most_sectors();
  const auto asks = end_asks(2);
  const State state =
      contracted(first_state(asks, chain.left_end.analyser_deg, sectors), accepted(), Minus::corrected, sectors);
  std::vector<std::vector<Number>> values;
  for (const Rational& degrees : right_deg) {
    values.push_back(closed(state, end_sectors(chain.right_end, right_loss_, chain.station_count(), asks,
                                               direction(number_, degrees), sectors)));
  }
  return values;
}

template class Chain<float>;
template class Chain<double>;
template class Chain<Interval>;
template class Chain<Rational>;

}  // namespace heraldgauge::compare::fock
