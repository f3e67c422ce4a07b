// Runs of like stations: the power against the steps one by one, and against closed forms.
#include "reference/pair_number/station_run.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "reference/pair_number/route.hpp"
#include "reference/pair_number/source_weights.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::Rational;
using test::Random;

constexpr Precision bits = 128;

void make_ideal(model::Chain& chain) {
  for (model::Source& source : chain.sources) source.kind = model::SourceKind::ideal_pair;
}

// Unlike entries, none 0.
std::vector<Matrix> some_states(std::size_t count, long rows) {
  std::vector<Matrix> states(count, Matrix(rows, rows, bits));
  for (std::size_t s = 0; s < count; ++s) {
    for (long a = 0; a < rows; ++a) {
      for (long b = 0; a + b < rows; ++b)
        states[s](a, b) = Interval(Rational(1, 1 + static_cast<long>(s) + 2 * a + 5 * b), bits);
    }
  }
  return states;
}

// Both enclose the same numbers. Where nothing cancels either is wider by (operations in a row) * 2^-bits a station: a
// power adds dim = rows (rows+1)/2 products (twice that by parity) where a step adds 2 rows, at most 10 times as many
// up to 9 rows; the rest of the factor 100 is left to signs that differ.
void expect_alike(const std::vector<Matrix>& power, const std::vector<Matrix>& steps) {
  ASSERT_EQ(power.size(), steps.size());
  for (std::size_t s = 0; s < power.size(); ++s) {
    ASSERT_EQ(power[s].rows(), steps[s].rows());
    for (long a = 0; a < power[s].rows(); ++a) {
      for (long b = 0; a + b < power[s].rows(); ++b) {
        EXPECT_TRUE(overlap(power[s](a, b), steps[s](a, b))) << s << ' ' << a << ' ' << b;
        EXPECT_LE(power[s](a, b).log2_width(), steps[s](a, b).log2_width() + std::log2(100.0))
            << s << ' ' << a << ' ' << b;
      }
    }
  }
}

// That the comparison says something: the weight of one pair is not 0 and known to 2^-100 of itself.
void expect_narrow(const std::vector<Matrix>& states) {
  for (const Matrix& state : states) EXPECT_LT(state(1, 0).log2_width(), state(1, 0).log2_mignitude() - 100);
}

void compare_power_with_steps(const model::Chain& chain, long cut, std::size_t length) {
  const std::vector<Interval> weights = state_weights(chain.sources[1], cut, bits);
  const StationOperator station(heralded(chain).station(0), cut, cut, cut, bits);
  for (const Strings strings : {Strings::corrected, Strings::by_parity}) {
    for (long sector = 0; sector <= cut; ++sector) {
      SCOPED_TRACE(testing::Message() << "length " << length << " sector " << sector << " by parity "
                                      << (strings == Strings::by_parity));
      const long rows = cut - sector + 1;
      const SectorStep step(station, strings, sector, weights);
      const std::vector<Matrix> states = some_states(4, rows);
      std::vector<Matrix> steps = states;
      for (std::size_t i = 0; i < length; ++i) steps = stepped(step, steps, rows, bits);
      expect_alike(powered(step, length, states, bits), steps);
      if (sector == 0) expect_narrow(steps);
    }
  }
}

TEST(StationRun, PowersAreTheStepsOfIdealPairs) {
  for (const char* dark : {"0", "1/1000"}) {
    model::Chain chain = test::alike_chain(1, "1/3", "1/2", "3/5", dark);
    make_ideal(chain);
    chain.stations[0].herald = model::Herald::either;
    for (const std::size_t length : {1u, 2u, 3u, 1023u, 1024u}) compare_power_with_steps(chain, 1, length);
  }
}

TEST(StationRun, PowersAreTheStepsOfWeakSources) {
  model::Chain chain = test::alike_chain(1, "1/100000", "1/10", "1/5", "1/1000000");
  chain.stations[0].herald = model::Herald::either;
  for (const std::size_t length : {1u, 2u, 3u, 1023u, 1024u}) compare_power_with_steps(chain, 3, length);
}

// Unlike detectors and arms, some photons distinguishable, a station of two products and more.
TEST(StationRun, PowersAreTheStepsWhereEverythingIsUnlike) {
  test::for_each_case(4, 61, [](Random& random) {
    test::ChainRecipe recipe;
    recipe.smallest_station_count = recipe.largest_station_count = 1;
    const model::Chain chain = test::random_chain(random, recipe);
    SCOPED_TRACE(test::describe_chain(chain));
    for (const std::size_t length : {2u, 7u, 60u}) compare_power_with_steps(chain, 2, length);
  });
}

// A chain of ideal pairs that differ from the others at source 30, station 71 and station 72: six runs.
HeraldedChain interrupted_chain() {
  model::Chain chain = test::alike_chain(150, "1/3", "1/2", "3/5", "1/1000");
  make_ideal(chain);
  for (model::Station& station : chain.stations) station.herald = model::Herald::either;
  chain.sources[30].pair_parameter = Rational(1, 2);
  chain.stations[70].detectors[model::dV].efficiency = Rational(1, 7);
  chain.stations[71].herald = model::Herald::psi_minus;
  return heralded(chain);
}

TEST(StationRun, EndsWhereSomethingChanges) {
  const HeraldedChain link = interrupted_chain();
  std::vector<long> cutoffs(link.source_count(), 1);
  std::vector<std::size_t> lengths;
  for (std::size_t k = 0; k < link.station_count(); k += lengths.back())
    lengths.push_back(run_length(link, cutoffs, k));
  EXPECT_EQ(lengths, (std::vector<std::size_t>{29, 1, 40, 1, 1, 78}));
  cutoffs[100] = 2;  // the stations 100 and 101 have it on one side
  EXPECT_EQ(run_length(link, cutoffs, 72), 27u);
  EXPECT_EQ(run_length(link, cutoffs, 99), 1u);
  EXPECT_EQ(run_length(link, cutoffs, 100), 1u);
  EXPECT_EQ(run_length(link, cutoffs, 101), 49u);
}

TEST(StationRun, UnlikeStationsSplitTheChain) {
  const HeraldedChain link = interrupted_chain();
  const std::vector<long> cutoffs(link.source_count(), 1);
  for (const Strings strings : {Strings::corrected, Strings::by_parity}) {
    for (long sector : {0L, 1L}) {
      const long rows = 2 - sector;
      std::vector<Matrix> steps = some_states(2, rows);
      std::vector<SectorStack> states;
      for (const Matrix& state : steps) {
        states.push_back({Matrix(2, 2, bits), Matrix(1, 1, bits)});
        states.back()[static_cast<std::size_t>(sector)] = state;
      }
      for (Matrix& state : steps) apply_weights(state, sector, state_weights(link.chain.sources[0], 1, bits));
      for (std::size_t k = 0; k < link.station_count(); ++k) {
        const std::vector<Interval> weights = state_weights(link.chain.sources[k + 1], 1, bits);
        const StationOperator station(link.station(k), 1, 1, 1, bits);
        steps = stepped(SectorStep(station, strings, sector, weights), steps, rows, bits);
      }
      std::vector<Matrix> contracted;
      for (SectorStack& state : contract_stations(link, cutoffs, strings, states, bits))
        contracted.push_back(state[static_cast<std::size_t>(sector)]);
      expect_alike(contracted, steps);
    }
  }
}

TEST(StationRunCost, PrefersPowersOfSmallStates) {
  const auto powers_cost_less = [](std::size_t length, long cut, Strings strings) {
    const std::size_t mixed = strings == Strings::by_parity ? 2 : 1;
    const RunSize run{length, cut + 1, mixed, mixed, strings};
    return doubling_cost(run) < stepping_cost(run);
  };
  for (const Strings strings : {Strings::corrected, Strings::by_parity}) {
    EXPECT_TRUE(powers_cost_less(2000, 1, strings));
    EXPECT_TRUE(powers_cost_less(2000, 4, strings));
    EXPECT_FALSE(powers_cost_less(2, 1, strings));
    EXPECT_FALSE(powers_cost_less(100, 20, strings));
    EXPECT_FALSE(powers_cost_less(10000, 20, strings));
  }
}

// Counted out for one state of ideal pairs, 3 numbers: a step takes 2 * 2 * 3 products and 3 weights; the power takes 9
// entries of a product and a weight, 3 squarings of 27, and for the two bits of 10 that are set 9 each.
TEST(StationRunCost, CountsMultiplications) {
  const RunSize run{10, 2, 1, 1, Strings::corrected};
  EXPECT_EQ(stepping_cost(run), 10 * 15);
  EXPECT_EQ(doubling_cost(run), 18 + 3 * 27 + 2 * 9);
}

Rational power_of(const Rational& x, unsigned long n) {
  model::Integer above, below;
  mpz_pow_ui(above.get_mpz_t(), x.get_num_mpz_t(), n);
  mpz_pow_ui(below.get_mpz_t(), x.get_den_mpz_t(), n);
  Rational value(above, below);
  value.canonicalize();
  return value;
}

void expect_near(const Interval& value, const Rational& exact) {
  EXPECT_TRUE(value.contains(exact));
  EXPECT_LT(value.log2_width(), value.log2_mignitude() - 100);
}

// 2000 stations between sources that give phi+ with probability p, no dark counts. A herald needs two photons at every
// station, so a pair from every source: p^(N+1). Both have to register, tau^2 with tau = eta t. Then psi+ is announced,
// by the amplitudes of the beam splitter, with the operator (1 + v X)/2 on the span of HV and VH, X exchanging the two
// and v the indistinguishability: psi+ itself for v = 1, a guess for v = 0; psi- with -v. Only its diagonal, 1/2,
// enters the herald. Whatever polarisation arrives at a station, its partner, half of a fresh phi+, is the opposite one
// with probability 1/2. So P = p^(N+1) (tau^2/4)^N for one Bell state, and p^(N+1) (tau^2/2)^N for both, at any v. The
// coherence between H and V at the ends is multiplied by v a station.
constexpr unsigned long stations = 2000;

model::Chain long_chain(model::Herald herald) {
  model::Chain chain = test::alike_chain(stations, "3/4", "1/2", "3/5", "0");
  make_ideal(chain);
  for (model::Station& station : chain.stations) {
    station.herald = herald;
    station.indistinguishability = Rational(999, 1000);
  }
  return chain;
}

Rational long_chain_herald(const Rational& one_station) {
  return power_of(Rational(3, 4), stations + 1) * power_of(one_station, stations);
}

const Rational tau(3, 10);
constexpr Accuracy accuracy{160, -100000};

TEST(LongIdealChain, HeraldsAsOftenAsWorkedOut) {
  for (const auto& [herald, bell_states] :
       {std::pair{model::Herald::psi_plus, 1L}, {model::Herald::psi_minus, 1L}, {model::Herald::either, 2L}}) {
    const model::Chain chain = long_chain(herald);
    const Bounded<Interval> bounded = make_pair_number_route(chain)->herald(accuracy);
    expect_near(bounded.value, long_chain_herald(tau * tau * bell_states / 4));
    EXPECT_TRUE(bounded.tail.is_exactly_zero());
    EXPECT_NEAR(pair_number_log2_herald(chain), bounded.value.log2_mignitude(), 1e-3);
  }
}

// At 45 degrees the photons at the ends agree with probability (1 + v^N)/2, psi- corrected; each registers with
// probability tau. With unlike detectors at the right end strings with an odd number of psi-, half of all, are recorded
// with exchanged bits, at the other detector.
TEST(LongIdealChain, DecoheresAsWorkedOut) {
  const Rational agree = (1 + power_of(Rational(999, 1000), stations)) / 2;
  for (const bool unlike : {false, true}) {
    model::Chain chain = long_chain(model::Herald::either);
    Rational at_right = tau;
    if (unlike) {
      chain.right_end.detectors[model::cross].efficiency = Rational(1, 5);
      at_right = (tau + Rational(1, 10)) / 2;
    }
    const auto joint = make_pair_number_route(chain)->ends(Basis::diagonal, accuracy).value.joint;
    const Rational both = long_chain_herald(tau * tau / 2) * tau * at_right / 2;
    expect_near(joint[2][2], both * agree);
    expect_near(joint[2][1], both * (1 - agree));
  }
}

}  // namespace
}  // namespace heraldgauge::reference::pair_number
