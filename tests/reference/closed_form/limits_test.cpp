// The closed forms where digits are lost or limits are reached.
#include <gtest/gtest.h>

#include "reference/closed_form/capacity.hpp"
#include "reference/closed_form/interference.hpp"
#include "reference/closed_form/measurement_device_independent.hpp"
#include "reference/closed_form/sign_change.hpp"
#include "reference/closed_form/two_mode_squeezed.hpp"
#include "reference/closed_form/waiting_time.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

namespace closed_form = reference::closed_form;
using model::Rational;
using model::Real;
using reference::Interval;

const reference::Field<Rational> exact;

double lost_bits(const Interval& x, reference::Precision bits) {
  return x.log2_width() - x.log2_mignitude() + static_cast<double>(bits);
}

TEST(Capacity, LosesNoDigitsForTinyAndForNearlyPerfectTransmittance) {
  const Rational tiny("1/1000000000000000000000000000000000000000000000000000000000000");
  for (const Real& eta : {Real(tiny), Real(Rational(1 - tiny)), Real(Rational(1, 2)), Real(Rational(1, 3))}) {
    EXPECT_LT(lost_bits(*reference::pure_loss_capacity(eta, 100), 100), 5) << eta.text();
    EXPECT_LT(lost_bits(*reference::loose_capacity(eta, 100), 100), 6) << eta.text();
  }
}

TEST(Capacity, IsZeroForABlockedChannelAndInfiniteForAPerfectOne) {
  EXPECT_TRUE(reference::pure_loss_capacity(Real(0), 64)->is_exactly_zero());
  EXPECT_TRUE(reference::loose_capacity(Real(0), 64)->is_exactly_zero());
  EXPECT_FALSE(reference::pure_loss_capacity(Real(1), 64).has_value());
  EXPECT_FALSE(reference::loose_capacity(Real(1), 64).has_value());
}

TEST(Capacity, OfAChainIsThatOfItsWorstPart) {
  for_each_case(50, 601, [](Random& random) {
    const model::Chain chain = random_chain(random);
    Rational all = 1, worst_source = 1, worst_arm = 1;
    for (std::size_t k = 0; k < chain.sources.size(); ++k) {
      const Rational left = chain.left_arms[k].transmittance.rational(),
                     right = chain.right_arms[k].transmittance.rational();
      all *= left * right;
      worst_source = std::min(worst_source, Rational(left * right));
      worst_arm = std::min({worst_arm, left, right});
    }
    const auto same = [](const Interval& a, const Interval& b) {
      return a.lower() == b.lower() && a.upper() == b.upper();
    };
    EXPECT_TRUE(same(*reference::capacity_point(chain, 90), *reference::pure_loss_capacity(Real(all), 90)));
    EXPECT_TRUE(same(*reference::capacity_loose(chain, 90), *reference::loose_capacity(Real(all), 90)));
    EXPECT_TRUE(same(*reference::capacity_chain(chain, 90), *reference::pure_loss_capacity(Real(worst_source), 90)));
    EXPECT_TRUE(same(*reference::capacity_arm(chain, 90), *reference::pure_loss_capacity(Real(worst_arm), 90)));
  });
}

// One lossy arm is enough for a finite capacity of the whole; the perfect ones are infinite and do not count.
TEST(Capacity, IgnoresPerfectPartsUntilAllArePerfect) {
  model::Chain chain = alike_chain(1, "1/10", "1", "1/2", "0");
  EXPECT_FALSE(reference::capacity_chain(chain, 64) || reference::capacity_arm(chain, 64) ||
               reference::capacity_point(chain, 64) || reference::capacity_loose(chain, 64));
  chain.left_arms[1].transmittance = Real(Rational(1, 2));
  EXPECT_TRUE(overlap(*reference::capacity_arm(chain, 64), Interval(1L, 64)));
  EXPECT_TRUE(overlap(*reference::capacity_chain(chain, 64), Interval(1L, 64)));
  EXPECT_TRUE(overlap(*reference::capacity_point(chain, 64), Interval(1L, 64)));
}

// The printed alternating sum is exact in rationals; the positive form must be the same number.
TEST(WaitingTime, ThePositiveFormEqualsThePrintedSum) {
  for (const Rational& p : {Rational(1, 10), Rational(1, 2), Rational(99, 100), Rational(1)}) {
    for (unsigned n = 1; n <= 24; ++n) {
      Rational alternating = 0, missed = 1;
      for (unsigned j = 1; j <= n; ++j) {
        missed *= 1 - p;
        model::Integer choices;
        mpz_bin_uiui(choices.get_mpz_t(), n, j);
        alternating += (j % 2 == 1 ? 1 : -1) * Rational(choices) / (1 - missed);
      }
      EXPECT_EQ(closed_form::mean_waiting_time(exact, p, n), alternating) << p << " " << n;
    }
  }
}

TEST(WaitingTime, LosesNoDigitsForManyLinks) {
  const reference::Field<Interval> field{100};
  const Interval many = closed_form::mean_waiting_time(field, field(Rational(1, 10)), 128);
  EXPECT_LT(lost_bits(many, 100), 20);
  EXPECT_GT(many.lower(), Rational("5206720293808/100000000000"));  // 52.06720293809
  EXPECT_LT(many.upper(), Rational("5206720293810/100000000000"));
}

// Eisenberg's bounds: H_n/l <= Z_n <= 1 + H_n/l, l = -ln(1-p).
TEST(WaitingTime, LiesBetweenItsBounds) {
  const reference::Field<Interval> field{100};
  for (const Rational& p : {Rational(1, 1000), Rational(1, 3), Rational(9, 10)}) {
    for (const unsigned n : {1U, 2U, 7U, 40U}) {
      const Interval time = closed_form::mean_waiting_time(field, field(p), n);
      const Interval middle = closed_form::half_shifted_rule(field(p), n), half = field(Rational(1, 2));
      EXPECT_TRUE(certainly_less(middle - half, time)) << p << " " << n;
      EXPECT_TRUE(certainly_less(time, middle + half)) << p << " " << n;
    }
  }
}

// 1 - I0 and the diagonal gain at fields so weak that the printed bracket would need 60 more digits.
TEST(MeasurementDeviceIndependent, LosesNoDigitsForWeakFields) {
  const reference::Field<Interval> field{120};
  const Interval weak = field(Rational("1/1000000000000000000000000000000"));
  const auto gains = closed_form::mdi_diagonal({weak, weak, field(0L), field(0L)});
  EXPECT_LT(lost_bits(gains.events, 120), 12);
  // Equal weak fields without noise: exactly one quarter in the limit, the usual 25 % (standard statement, from
  // memory).
  const Interval rate = gains.errors / gains.events;
  EXPECT_LT(absolute(rate - field(Rational(1, 4))).upper(), Rational("1/10000000000000000000000000000"));
}

// 1 + 2 y^2 - 4 y I0(x) + I0(2x), the bracket as printed, at an ordinary field.
TEST(MeasurementDeviceIndependent, TheRegroupedBracketIsThePrintedOne) {
  const reference::Field<Interval> field{300};
  const Interval a = field(Rational(3, 10)), b = field(Rational(7, 10)), dark = field(Rational(1, 1000));
  const Interval y = (field(1L) - dark) * exponential(-(a + b) / field(4L));
  const Interval x = square_root(a * b) / field(2L);
  const auto i0 = [&](const Interval& z) { return closed_form::bessel_i0_minus_1(z) + field(1L); };
  const Interval bracket = field(1L) + square(y) * 2L - y * i0(x) * 4L + i0(x * 2L);
  const auto gains = closed_form::mdi_diagonal({a, b, dark, field(0L)});
  EXPECT_TRUE(overlap(gains.events, square(y) * bracket * 2L));
  EXPECT_LT(lost_bits(gains.events, 300), 20);
}

TEST(TwoModeSqueezed, SatisfiesItsLimitsInExactRationals) {
  const Rational mean(1, 7);
  const auto mode = closed_form::heralded_mode(exact, mean, Rational(1), Rational(0));
  EXPECT_EQ(mode.g2, 2 * mean / (1 + mean));
  // A herald that always fires (d = 1) leaves a thermal mode: g2 = 2, mean N.
  const auto always = closed_form::heralded_mode(exact, mean, Rational(1, 3), Rational(1));
  EXPECT_EQ(always.g2, 2);
  EXPECT_EQ(always.mean, mean);
}

// d = 0: V = (1+lambda)/(1 + lambda + 2 lambda D); eta = 1: 1/(1 + 2 lambda).
TEST(PairVisibility, SatisfiesItsShortForms) {
  const Rational lambda(1, 11), a(2, 7), b(3, 5), none(0);
  const auto extremes = closed_form::pair_coincidence(exact, lambda, a, b, none);
  const Rational d = 1 + lambda * (a + b - a * b);
  EXPECT_EQ(closed_form::visibility(extremes), (1 + lambda) / (1 + lambda + 2 * lambda * d));
  const auto lossless = closed_form::pair_coincidence(exact, lambda, Rational(1), Rational(1), none);
  EXPECT_EQ(closed_form::visibility(lossless), 1 / (1 + 2 * lambda));
}

TEST(SignChange, EnclosesTheRootAndRefusesWithoutOne) {
  const reference::Field<Interval> field{200};
  const auto f = [&](const Interval& x) -> Interval { return square(x) - field(2L); };
  const auto root = closed_form::sign_change(f, 1, 2, 200);
  ASSERT_TRUE(root.has_value());
  EXPECT_TRUE(overlap(*root, square_root(field(2L))));
  EXPECT_LT(root->log2_width(), -190);
  EXPECT_FALSE(closed_form::sign_change(f, 2, 3, 200).has_value());
}

}  // namespace
}  // namespace heraldgauge::test
