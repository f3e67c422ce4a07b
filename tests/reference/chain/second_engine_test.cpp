// Random chains, everything unequal, against independent evaluations: one determinant of all modes in Arb ball
// arithmetic, brute force in a truncated Fock space, and mpmath.
#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/arb_determinant.hpp"
#include "tests/support/certified.hpp"
#include "tests/support/fock.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

using model::Ask;
using model::Chain;
using model::Pattern;
using model::Rational;
using reference::Enclosure;

constexpr reference::Precision arb_bits = 700;

void add_background(Random& random, Chain& chain) {
  const auto background = [&] {
    return model::Background{Rational(log_uniform(random, 1e-6, 1)), 1 + static_cast<long>(random() % 5)};
  };
  for (model::Station& station : chain.stations) {
    if (random() % 2 == 0) station.background = background();
  }
  if (random() % 2 == 0) chain.left_end.background = background();
  if (random() % 2 == 0) chain.right_end.background = background();
}

Enclosure by_arb(const Chain& chain, const Pattern& pattern) {
  const reference::Interval value = arb_pattern_probability(chain, pattern, arb_bits);
  return {value.lower(), value.upper()};
}

TEST(SecondEngine, PatternProbabilitiesOverlapThoseOfOneDeterminantInArb) {
  for_each_case(60, 501, [](Random& random) {
    Chain chain = random_chain(random);
    if (random() % 2 == 0) add_background(random, chain);
    const Pattern pattern = random_pattern(random, chain.station_count());
    const Enclosure ours = enclosure(chain, pattern), theirs = by_arb(chain, pattern);
    EXPECT_TRUE(has_width(ours, 30)) << shown(ours);
    EXPECT_TRUE(has_width(theirs, 60)) << shown(theirs);
    EXPECT_TRUE(overlap(ours, theirs)) << shown(ours) << " " << shown(theirs) << " " << describe_chain(chain);
  });
}

// The quantities by enumeration: every string of accepted outcomes, the right angle reversed where an odd number of
// them is psi-, every end pattern, each probability from Arb.
class Enumeration {
 public:
  explicit Enumeration(const Chain& chain) : chain_(chain) { extend({}, false); }

  Enclosure herald() const { return sum_over({}, {}, chain_); }

  Enclosure end_pattern(int bits, const Rational& left_deg, const Rational& right_deg) const {
    const auto ask = [bits](int bit) { return Ask{(bits >> bit & 1) != 0 ? Ask::Kind::clicks : Ask::Kind::silent}; };
    Chain turned = chain_;
    turned.left_end.analyser_deg = left_deg;
    turned.right_end.analyser_deg = right_deg;
    return sum_over({ask(3), ask(2)}, {ask(1), ask(0)}, turned);
  }

  // {click at both ends, erroneous among them}; with two clicks at an end the outcome is drawn evenly.
  std::pair<Enclosure, Enclosure> both_click(const Rational& deg, bool agreement_expected) const {
    std::pair<Enclosure, Enclosure> sums{{0, 0}, {0, 0}};
    for (int left = 1; left < 4; ++left) {
      for (int right = 1; right < 4; ++right) {
        const Enclosure p = end_pattern(4 * left + right, deg, deg);
        const bool drawn = left == 3 || right == 3;
        const Rational wrong = drawn ? Rational(1, 2) : Rational((left == right) != agreement_expected ? 1 : 0);
        sums.first = sum(sums.first, p);
        sums.second = sum(sums.second, {p.lower * wrong, p.upper * wrong});
      }
    }
    return sums;
  }

 private:
  struct Outcomes {
    std::vector<std::array<Ask, 4>> stations;
    bool odd;
  };

  void extend(std::vector<std::array<Ask, 4>> so_far, bool odd) {
    if (so_far.size() == chain_.station_count()) {
      strings_.push_back({so_far, odd});
      return;
    }
    for (const auto& outcome : model::accepted_outcomes(chain_.stations[so_far.size()].herald)) {
      auto longer = so_far;
      longer.push_back(outcome.detectors);
      extend(longer, odd != outcome.minus);
    }
  }

  Enclosure sum_over(const std::array<Ask, 2>& left, const std::array<Ask, 2>& right, const Chain& chain) const {
    Enclosure all{0, 0};
    for (const Outcomes& outcomes : strings_) {
      Chain corrected = chain;
      if (outcomes.odd) corrected.right_end.analyser_deg = -corrected.right_end.analyser_deg;
      all = sum(all, by_arb(corrected, {outcomes.stations, left, right}));
    }
    return all;
  }

  const Chain& chain_;
  std::vector<Outcomes> strings_;
};

void expect_overlap(const Chain& chain, const std::string& quantity, const Enclosure& expected) {
  const Enclosure ours = enclosure(chain, quantity);
  EXPECT_TRUE(has_width(ours, 30)) << quantity << " " << shown(ours);
  EXPECT_TRUE(overlap(ours, expected)) << quantity << " " << shown(ours) << " " << shown(expected) << " "
                                       << describe_chain(chain);
}

TEST(SecondEngine, QuantitiesOverlapTheirEnumerationOverAllPatterns) {
  ChainRecipe recipe;
  recipe.largest_station_count = 2;
  for_each_case(5, 502, [&](Random& random) {
    Chain chain = random_chain(random, recipe);
    if (chain.station_count() > 0) chain.stations[0].herald = model::Herald::either;
    if (random() % 2 == 0) add_background(random, chain);
    const Enumeration enumeration(chain);
    const Enclosure herald = enumeration.herald();
    expect_overlap(chain, "herald_probability", chain.station_count() == 0 ? Enclosure{1, 1} : herald);
    for (const int bits : {0, 1, 6, 9, 10, 15}) {
      const auto& ends = chain;
      const Enclosure p = enumeration.end_pattern(bits, ends.left_end.analyser_deg, ends.right_end.analyser_deg);
      expect_overlap(chain, model::name_of({model::QuantityKind::end_pattern, bits}), quotient(p, herald));
    }
    const auto [gain, wrong] = enumeration.both_click(0, chain.station_count() % 2 == 0);
    expect_overlap(chain, "gain", quotient(gain, herald));
    expect_overlap(chain, "qber_rectilinear", quotient(wrong, gain));
  });
}

// With alike detectors at the right end, exchanging recorded bits and reversing the angle are the same correction.
TEST(SecondEngine, TheDiagonalErrorRateOverlapsItsEnumeration) {
  ChainRecipe recipe;
  recipe.largest_station_count = 2;
  for_each_case(2, 503, [&](Random& random) {
    Chain chain = random_chain(random, recipe);
    if (chain.station_count() > 0) chain.stations[0].herald = model::Herald::either;
    chain.right_end.detectors[model::cross] = chain.right_end.detectors[model::plus];
    const auto [gain, wrong] = Enumeration(chain).both_click(45, true);
    expect_overlap(chain, "qber_diagonal", quotient(wrong, gain));
  });
}

// With unlike detectors the recorded bits are exchanged where an odd number of outcomes is psi-: formed from recorded
// patterns.
TEST(SecondEngine, TheDiagonalErrorRateWithUnlikeDetectorsExchangesRecordedBits) {
  ChainRecipe recipe;
  recipe.smallest_station_count = recipe.largest_station_count = 1;
  for_each_case(4, 504, [&](Random& random) {
    Chain chain = random_chain(random, recipe);
    chain.stations[0].herald = model::Herald::either;
    chain.left_end.analyser_deg = chain.right_end.analyser_deg = 45;
    Enclosure gain{0, 0}, wrong{0, 0};
    for (const auto& outcome : model::accepted_outcomes(model::Herald::either)) {
      for (int left = 1; left < 4; ++left) {
        for (int right = 1; right < 4; ++right) {
          const auto asks = [](int bits) {
            const auto kind = [bits](int bit) { return (bits & bit) != 0 ? Ask::Kind::clicks : Ask::Kind::silent; };
            return std::array<Ask, 2>{Ask{kind(2)}, Ask{kind(1)}};
          };
          const Enclosure p = by_arb(chain, {{outcome.detectors}, asks(left), asks(right)});
          const bool drawn = left == 3 || right == 3;
          const bool agree = (left == right) != outcome.minus;
          const Rational weight = drawn ? Rational(1, 2) : Rational(agree ? 0 : 1);
          gain = sum(gain, p);
          wrong = sum(wrong, {p.lower * weight, p.upper * weight});
        }
      }
    }
    expect_overlap(chain, "qber_diagonal", quotient(wrong, gain));
  });
}

// Brute force: number states, explicit beam splitters. Catches a formula that both determinants share.
TEST(SecondEngine, PatternProbabilitiesLieInTheBruteForceInterval) {
  ChainRecipe recipe;
  recipe.largest_station_count = 2;
  recipe.smallest_lam = 1e-4;
  recipe.largest_lam = 3e-3;
  recipe.smallest_transmission = 0.2;
  for_each_case(12, 505, [&](Random& random) {
    const Chain chain = random_chain(random, recipe);
    const Pattern pattern = random_pattern(random, chain.station_count());
    const FockValue brute = fock_pattern_probability(chain, pattern, 4);
    const double ours = enclosure(chain, pattern).lower.get_d();
    const double rounding = 1e-12 * std::max(brute.value, 1e-6);
    EXPECT_GE(ours, brute.value - rounding) << describe_chain(chain);
    EXPECT_LE(ours, brute.value + brute.tail + rounding) << describe_chain(chain);
  });
}

// One station with unequal arms, unequal sources and all detectors different: an order of factors that is wrong shows.
TEST(SecondEngine, OneStationWithUnequalArmsAgreesWithBruteForce) {
  ChainRecipe recipe;
  recipe.smallest_station_count = recipe.largest_station_count = 1;
  recipe.smallest_lam = 5e-4;
  recipe.largest_lam = 1e-3;
  recipe.smallest_transmission = 0.3;
  recipe.largest_dark = 1e-4;
  for_each_case(10, 506, [&](Random& random) {
    const Chain chain = random_chain(random, recipe);
    for (const auto& outcome : model::accepted_outcomes(model::Herald::either)) {
      Pattern asked = pattern({"****"}, "10", "10");
      asked.stations[0] = outcome.detectors;
      const FockValue brute = fock_pattern_probability(chain, asked, 4);
      const double ours = enclosure(chain, asked).lower.get_d();
      EXPECT_NEAR(ours, brute.value, brute.tail + 1e-12 * ours) << describe_chain(chain);
      EXPECT_LT(brute.tail, 1e-3 * brute.value);
    }
  });
}

}  // namespace
}  // namespace heraldgauge::test
