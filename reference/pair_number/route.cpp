#include "reference/pair_number/route.hpp"

#include <algorithm>

#include "reference/optics/angles.hpp"
#include "reference/pair_number/certified_tail.hpp"
#include "reference/pair_number/profile.hpp"
#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference {
namespace {

using namespace pair_number;
using model::Ask;
using model::Rational;

using Table = std::vector<std::vector<Interval>>;  // [left pattern][right pattern]

// The four patterns of an end, index 2 * plus + cross.
std::vector<EndAsk> end_patterns() {
  const Ask silent{Ask::Kind::silent};
  const Ask clicks{Ask::Kind::clicks};
  return {{silent, silent}, {silent, clicks}, {clicks, silent}, {clicks, clicks}};
}

EndAngles angles_of(const model::Chain& chain, Basis basis) {
  if (basis == Basis::rectilinear) return {0, 0};
  if (basis == Basis::diagonal) return effective_angles(chain, {45, 45});
  return effective_angles(chain, {chain.left_end.analyser_deg, chain.right_end.analyser_deg});
}

// Contracts the stations once for all left patterns, and closes with every right pattern.
class EndContraction {
 public:
  EndContraction(const HeraldedChain& link, const EndAngles& angles, const std::vector<EndAsk>& left,
                 const std::vector<EndAsk>& right, const std::vector<long>& cutoffs, Precision bits)
      : link_(link), angles_(angles), left_(left), right_(right), cutoffs_(cutoffs), bits_(bits) {
    const auto keeps = [](const EndPlace& place, const std::vector<EndAsk>& asks, const Rational& degrees) {
      return std::all_of(asks.begin(), asks.end(),
                         [&](const EndAsk& ask) { return keeps_polarisations(place, ask, degrees); });
    };
    const bool only_zero =
        keeps(link.left_end(), left, angles.left_deg) || keeps(link.right_end(), right, angles.right_deg);
    sectors_ = only_zero ? 0 : sectors_within(cutoffs);
  }

  Table corrected() const {
    std::vector<SectorStack> states;
    for (const EndAsk& ask : left_) states.push_back(left_elements(ask));
    return closed(contract_stations(link_, cutoffs_, Strings::corrected, std::move(states), bits_));
  }

  // Strings with an even and with an odd number of psi- by themselves, nothing corrected.
  std::array<Table, 2> by_parity() const {
    std::vector<SectorStack> states;
    for (const EndAsk& ask : left_) {
      states.push_back(left_elements(ask));
      states.push_back(zero_like(states.back()));
    }
    states = contract_stations(link_, cutoffs_, Strings::by_parity, std::move(states), bits_);
    std::array<std::vector<SectorStack>, 2> parts;
    for (std::size_t s = 0; s < states.size(); ++s) parts[s % 2].push_back(std::move(states[s]));
    return {closed(parts[0]), closed(parts[1])};
  }

 private:
  SectorStack left_elements(const EndAsk& ask) const {
    return end_elements(link_.left_end(), Side::left, ask, angles_.left_deg, cutoffs_.front(), sectors_, bits_);
  }
  SectorStack zero_like(const SectorStack& stack) const {
    SectorStack zeros;
    for (const Matrix& matrix : stack) zeros.emplace_back(matrix.rows(), matrix.columns(), bits_);
    return zeros;
  }
  Table closed(const std::vector<SectorStack>& states) const {
    Table table(states.size());
    for (const EndAsk& ask : right_) {
      const SectorStack end =
          end_elements(link_.right_end(), Side::right, ask, angles_.right_deg, cutoffs_.back(), sectors_, bits_);
      for (std::size_t i = 0; i < states.size(); ++i) table[i].push_back(close_chain(states[i], end, bits_));
    }
    return table;
  }

  const HeraldedChain& link_;
  EndAngles angles_;
  const std::vector<EndAsk>& left_;
  const std::vector<EndAsk>& right_;
  const std::vector<long>& cutoffs_;
  Precision bits_;
  long sectors_;
};

std::size_t exchanged(std::size_t pattern) { return (pattern & 1) << 1 | pattern >> 1; }

class PairNumberRoute : public Route {
 public:
  explicit PairNumberRoute(const model::Chain& chain) : chain_(chain), heralded_(heralded(chain)) {}

  std::string name() const override { return "pair-number"; }

  Bounded<Interval> herald(const Accuracy& accuracy) const override {
    return single(heralded_, EndAsk{}, EndAsk{}, accuracy);
  }

  Bounded<Interval> pattern(const model::Pattern& pattern, const Accuracy& accuracy) const override {
    return single(with_pattern(chain_, pattern), pattern.left, pattern.right, accuracy);
  }

  Bounded<EndTable<Interval>> ends(Basis basis, const Accuracy& accuracy) const override {
    const std::vector<EndAsk> patterns = end_patterns();
    const bool exchanging = exchanges_bits(basis);
    // Two bounds are added where bits are exchanged.
    const double log2_tail = accuracy.log2_tail - (exchanging ? 1 : 0);
    const CertifiedTail tail = certified_tail(heralded_, patterns, patterns, log2_tail);
    const EndContraction contraction(heralded_, angles_of(chain_, basis), patterns, patterns, tail.cutoffs,
                                     accuracy.bits);
    const Table kept = exchanging ? with_exchanged_bits(contraction.by_parity()) : contraction.corrected();
    // A string of either parity may leave its tail at a pattern or at the exchanged one.
    const Table left_out = exchanging ? with_exchanged_bits({tail.bound, tail.bound}) : tail.bound;
    return {raised_table(kept, left_out), tail.cutoffs, exchanging ? tail.largest * 2L : tail.largest};
  }

  AngularProfile profile(const Accuracy& accuracy) const override { return pair_number_profile(heralded_, accuracy); }

 private:
  Bounded<Interval> single(const HeraldedChain& link, const EndAsk& left, const EndAsk& right,
                           const Accuracy& accuracy) const {
    const CertifiedTail tail = certified_tail(link, {left}, {right}, accuracy.log2_tail);
    const std::vector<EndAsk> lefts{left};
    const std::vector<EndAsk> rights{right};
    const EndContraction contraction(link, angles_of(chain_, Basis::analyser), lefts, rights, tail.cutoffs,
                                     accuracy.bits);
    return {raised(contraction.corrected()[0][0], tail.largest), tail.cutoffs, tail.largest};
  }

  // Without psi- there is nothing to exchange; with alike detectors at the right end, exchanging the bits at 45 degrees
  // is the same as reversing V.
  bool exchanges_bits(Basis basis) const {
    const auto& detectors = chain_.right_end.detectors;
    const bool has_minus =
        std::any_of(chain_.stations.begin(), chain_.stations.end(),
                    [](const model::Station& station) { return station.herald != model::Herald::psi_plus; });
    return basis == Basis::diagonal && has_minus && detectors[model::plus] != detectors[model::cross];
  }

  static Table with_exchanged_bits(const std::array<Table, 2>& by_parity) {
    Table table = by_parity[0];
    for (std::size_t left = 0; left < 4; ++left) {
      for (std::size_t right = 0; right < 4; ++right) table[left][right] += by_parity[1][left][exchanged(right)];
    }
    return table;
  }

  static EndTable<Interval> raised_table(const Table& kept, const Table& tail) {
    const auto row = [&](std::size_t left) {
      const auto entry = [&](std::size_t right) { return raised(kept[left][right], tail[left][right]); };
      return std::array<Interval, 4>{entry(0), entry(1), entry(2), entry(3)};
    };
    return {{row(0), row(1), row(2), row(3)}};
  }

  model::Chain chain_;
  HeraldedChain heralded_;
};

}  // namespace

std::unique_ptr<Route> make_pair_number_route(const model::Chain& chain) {
  return std::make_unique<PairNumberRoute>(chain);
}

}  // namespace heraldgauge::reference
