// Elementary functions against Arb ball arithmetic (a second engine at another precision), and against mpmath.
#include <gtest/gtest.h>

#include <cmath>

#include "reference/arithmetic/interval.hpp"
#include "tests/support/arb_engine.hpp"
#include "tests/support/published.hpp"
#include "tests/support/python.hpp"
#include "tests/support/random_chain.hpp"
#include "tests/support/random_rational.hpp"

namespace heraldgauge::reference {
namespace {

using test::arb_value;
using test::Elementary;
using test::for_each_case;
using test::Random;

struct Entry {
  Elementary f;
  Interval (*value)(const Interval&);
  const char* name;    // in mpmath, as a function of x
  double least, most;  // domain that is tried; logarithmic where least > 0
};

const Entry entries[] = {
    {Elementary::square_root, square_root, "sqrt(x)", 1e-300, 1e300},
    {Elementary::exponential, exponential, "exp(x)", -700, 700},
    {Elementary::exponential_m1, exponential_m1, "expm1(x)", -20, 20},
    {Elementary::exponential_m1, exponential_m1, "expm1(x)", 1e-300, 1},
    {Elementary::power_of_ten, power_of_ten, "power(10, x)", -300, 300},
    {Elementary::logarithm, logarithm, "log(x)", 1e-300, 1e300},
    {Elementary::binary_logarithm, binary_logarithm, "log(x)/log(2)", 1e-300, 1e300},
    {Elementary::logarithm_1p, logarithm_1p, "log1p(x)", 1e-300, 1e300},
    {Elementary::logarithm_1p, logarithm_1p, "log1p(x)", -0.999, 1},
    {Elementary::hyperbolic_tangent, hyperbolic_tangent, "tanh(x)", -20, 20},
    {Elementary::hyperbolic_tangent, hyperbolic_tangent, "tanh(x)", 1e-300, 1},
    {Elementary::cosine, cosine, "cos(x)", -10, 10},
    {Elementary::sine, sine, "sin(x)", -10, 10},
    {Elementary::sine, sine, "sin(x)", 1e-300, 1},
};

double argument(Random& random, const Entry& entry) {
  return entry.least > 0 ? test::log_uniform(random, entry.least, entry.most)
                         : test::uniform(random, entry.least, entry.most);
}

TEST(Elementary, EnclosuresOverlapThoseOfArbAtTheSamePrecisionAndFarAbove) {
  for_each_case(600, 201, [](Random& random) {
    for (const Entry& entry : entries) {
      const Precision bits = 53 + static_cast<Precision>(random() % 200);
      const Rational x(argument(random, entry));
      const Rational width =
          random() % 2 == 0 ? Rational(0) : Rational(abs(x) * Rational(test::log_uniform(random, 1e-30, 1e-3)));
      const Interval at(x, x + width, bits);
      const Interval ours = entry.value(at);
      for (const Precision theirs : {bits, 2 * bits + 64}) {
        const auto arb = arb_value(entry.f, at, theirs);
        ASSERT_TRUE(arb.has_value()) << entry.name;
        EXPECT_TRUE(overlap(ours, *arb)) << entry.name << " at " << x << " + " << width;
      }
      const auto point = arb_value(entry.f, Interval(x, bits), 2 * bits + 64);
      EXPECT_TRUE(overlap(ours, *point)) << entry.name << " at the lower end " << x;
    }
  });
}

// Of a point, at most two units of the last place, relative to the value: nothing is lost near a zero of the function.
TEST(Elementary, AnEnclosureOfAPointIsTwoLastPlacesWide) {
  for_each_case(600, 202, [](Random& random) {
    for (const Entry& entry : entries) {
      const Precision bits = 53 + static_cast<Precision>(random() % 200);
      const Interval value = entry.value(Interval(Rational(argument(random, entry)), bits));
      if (value.is_exactly_zero()) continue;
      EXPECT_LE(value.log2_width() - value.log2_mignitude(), 2.0 - static_cast<double>(bits)) << entry.name;
    }
  });
}

TEST(Elementary, TheRangeOverAnIntervalIsNoWiderThanItsEndsRequire) {
  for_each_case(300, 203, [](Random& random) {
    for (const Entry& entry : entries) {
      if (entry.f == Elementary::cosine || entry.f == Elementary::sine) continue;
      const Rational x(argument(random, entry));
      const Rational y = x + abs(x) * Rational(1, 1000);
      const Interval range = entry.value(Interval(x, y, 128));
      const Interval ends = hull(entry.value(Interval(x, 128)), entry.value(Interval(y, 128)));
      EXPECT_EQ(range.lower(), ends.lower()) << entry.name;
      EXPECT_EQ(range.upper(), ends.upper()) << entry.name;
    }
  });
}

TEST(Elementary, CosineAndSineReachTheirExtremesInsideAnInterval) {
  const Interval around_pi(Rational(3), Rational(4), 64);
  EXPECT_EQ(cosine(around_pi).lower(), -1);
  EXPECT_EQ(sine(Interval(Rational(1), Rational(2), 64)).upper(), 1);
  EXPECT_EQ(cosine(Interval(Rational(-1), Rational(7), 64)).upper(), 1);
}

TEST(Elementary, ConstantsOverlapThoseOfArbAndAreOneLastPlaceWide) {
  for (const Precision bits : {2, 24, 53, 64, 256, 1000, 33219}) {
    EXPECT_TRUE(overlap(pi(bits), test::arb_pi(2 * bits + 64)));
    EXPECT_TRUE(overlap(log_of_2(bits), test::arb_log_of_2(2 * bits + 64)));
    EXPECT_LE(pi(bits).log2_width(), 2.0 - static_cast<double>(bits));
    EXPECT_LE(log_of_2(bits).log2_width(), -static_cast<double>(bits));
  }
}

// mpmath at 80 digits, rounded to 60: its value lies within the enclosure widened by one unit of its last digit.
TEST(Elementary, MpmathAgreesToSixtyDigits) {
  std::string script = "from mpmath import *\nmp.dps = 80\n";
  std::vector<Interval> ours;
  std::vector<std::string> asked;
  for_each_case(5, 204, [&](Random& random) {
    for (const Entry& entry : entries) {
      const Rational x(argument(random, entry));
      script += "x = mpf(" + x.get_num().get_str() + ")/mpf(" + x.get_den().get_str() + ")\n";
      script += std::string("print(nstr(") + entry.name + ", 60, strip_zeros=False, min_fixed=1, max_fixed=0))\n";
      ours.push_back(entry.value(Interval(x, 260)));
      asked.push_back(std::string(entry.name) + " at " + x.get_str());
    }
  });
  const std::vector<std::string> lines = test::python_lines(script);
  ASSERT_EQ(lines.size(), ours.size());
  for (std::size_t i = 0; i < lines.size(); ++i) {
    const Rational value = test::exact_decimal(lines[i]);
    const Rational slack = 2 * test::half_unit_of_last_digit(lines[i]);
    EXPECT_LE(ours[i].lower(), value + slack) << asked[i];
    EXPECT_GE(ours[i].upper(), value - slack) << asked[i];
  }
}

// The exact reals of the model: rational where they fold, enclosed else.
TEST(Elementary, RealsAreEnclosedThroughTheirExpressions) {
  const model::Real loss = model::Real::power_of_ten(model::Real(Rational(-13, 20)));
  const model::Real lam = model::Real::hyperbolic_tangent(model::Real(Rational(1, 5)));
  const Interval product = enclose(loss * lam * lam / (model::Real(1) + lam), 200);
  const Interval t = *arb_value(Elementary::power_of_ten, Interval(Rational(-13, 20), 400), 400);
  const Interval h = *arb_value(Elementary::hyperbolic_tangent, Interval(Rational(1, 5), 400), 400);
  EXPECT_TRUE(overlap(product, t * square(h) / (Interval(1L, 400) + h)));
  EXPECT_LT(product.log2_width(), -195);
  EXPECT_EQ(enclose(model::Real(Rational(3, 8)), 53).upper(), Rational(3, 8));
}

}  // namespace
}  // namespace heraldgauge::reference
