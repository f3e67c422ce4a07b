#include "reference/model/exact_number.hpp"

#include <gtest/gtest.h>

#include <bit>
#include <cmath>
#include <cstdint>
#include <cstdlib>

#include "tests/support/effort.hpp"

namespace heraldgauge::model {
namespace {

// Independent of the reader: GMP's own fraction parser.
Rational fraction(const std::string& text) {
  Rational x(text);
  x.canonicalize();
  return x;
}

TEST(ParseExact, MeansTheDecimalAsTyped) {
  EXPECT_EQ(*parse_exact("0.1"), fraction("1/10"));
  EXPECT_EQ(*parse_exact("-1.25e-3"), fraction("-1/800"));
  EXPECT_EQ(*parse_exact("+7"), 7);
  EXPECT_EQ(*parse_exact(".5"), fraction("1/2"));
  EXPECT_EQ(*parse_exact("5."), 5);
  EXPECT_EQ(*parse_exact("1_000.000_1"), fraction("10000001/10000"));
  EXPECT_EQ(*parse_exact("3/7"), fraction("3/7"));
  EXPECT_EQ(*parse_exact("-0.3/0.6"), fraction("-1/2"));
  EXPECT_EQ(*parse_exact("2E2"), 200);
  EXPECT_EQ(*parse_exact("-0"), 0);
  EXPECT_EQ(*parse_exact("0007"), 7);
}

TEST(ParseExact, RefusesWhatIsNoDecimal) {
  for (const char* text : {"",     "+",   "-",   ".",     "e5",    "1e",  "1e+",   "nan", "+nan",     "inf",  "-inf",
                           "0x1F", "0o7", "0b1", "1,5",   "1 ",    " 1",  "1__0",  "_1",  "1_",       "1._5", "1e5.0",
                           "1/",   "/2",  "1/0", "1/0.0", "1/2/3", "--1", "1e5e5", "1f",  "\xc2\xbd", "1\t"}) {
    const auto parsed = parse_exact(text);
    ASSERT_FALSE(parsed) << text;
    EXPECT_FALSE(parsed.faults().front().wrong.empty());
    EXPECT_FALSE(parsed.faults().front().allowed.empty());
  }
  EXPECT_NE(parse_exact("1,5").faults().front().wrong.find("the decimal separator is a point"), std::string::npos);
  EXPECT_NE(parse_exact("0x1F").faults().front().wrong.find("hexadecimal"), std::string::npos);
}

TEST(ParseExact, HoldsItsCaps) {
  EXPECT_TRUE(parse_exact(std::string(10000, '7')));
  EXPECT_FALSE(parse_exact(std::string(10001, '7')));
  EXPECT_TRUE(parse_exact("1e10000"));
  EXPECT_TRUE(parse_exact("1e-10000"));
  EXPECT_FALSE(parse_exact("1e10001"));
  EXPECT_FALSE(parse_exact("1e-10001"));
  EXPECT_FALSE(parse_exact("1e99999999999999999999999"));
  EXPECT_FALSE(parse_exact(std::string(10'000'000, '1')));
}

TEST(ParseExact, ReadsTenThousandDigitsExactly) {
  const std::string digits = "0." + std::string(9998, '0') + "3";
  Rational power = *parse_exact("1e-9999");
  EXPECT_EQ(*parse_exact(digits), 3 * power);
}

Rational of_strtod(const std::string& text) { return Rational(std::strtod(text.c_str(), nullptr)); }

TEST(NearestBinary64, AgreesWithStrtodOnRandomLiterals) {
  test::for_each_case(4000, 1, [](test::Random& random) {
    std::string text = random() % 2 == 0 ? "-" : "";
    text += std::to_string(random() % 10) + "." + std::to_string(random());
    text += "e" + std::to_string(static_cast<int>(random() % 640) - 332);
    if (std::isinf(std::strtod(text.c_str(), nullptr))) {
      EXPECT_FALSE(nearest_binary64(*parse_exact(text))) << text;
    } else {
      EXPECT_EQ(*nearest_binary64(*parse_exact(text)), of_strtod(text)) << text;
    }
  });
}

// Every exponent of binary64, subnormals included: the double itself, the point half way to its neighbour (to the even
// one), and points just beside that.
TEST(NearestBinary64, BreaksTiesToEvenAtEveryExponent) {
  for (int exponent = -1074; exponent <= 1023; ++exponent) {
    for (const double significand : {1.0, 1.0 + 0x1p-52, 2.0 - 0x1p-52}) {
      const double below = std::ldexp(significand, exponent);
      const double above = std::nextafter(below, INFINITY);
      if (std::isinf(above)) continue;
      const Rational low(below), high(above);
      const Rational middle = (low + high) / 2, nudge = (high - low) / 1'000'000'007;
      const bool low_is_even = (std::bit_cast<std::uint64_t>(below) & 1) == 0;
      EXPECT_EQ(*nearest_binary64(low), low) << exponent;
      EXPECT_EQ(*nearest_binary64(middle), low_is_even ? low : high) << exponent;
      EXPECT_EQ(*nearest_binary64(middle - nudge), low) << exponent;
      EXPECT_EQ(*nearest_binary64(-middle - nudge), -high) << exponent;
    }
  }
}

TEST(NearestBinary64, MeetsBothEndsOfTheRange) {
  const Rational tiny(0x1p-1074);
  EXPECT_EQ(*nearest_binary64(tiny / 2), 0);
  EXPECT_EQ(*nearest_binary64(tiny * 3 / 4), tiny);
  EXPECT_EQ(*nearest_binary64(tiny * 3 / 2), 2 * tiny);
  EXPECT_EQ(*nearest_binary64(*parse_exact("1e-10000")), 0);
  const Rational largest(0x1.fffffffffffffp1023), half_step(0x1p970);
  EXPECT_EQ(*nearest_binary64(largest), largest);
  EXPECT_EQ(*nearest_binary64(largest + half_step - 1), largest);
  EXPECT_FALSE(nearest_binary64(largest + half_step));
  EXPECT_FALSE(nearest_binary64(-largest - half_step));
}

TEST(ExactText, WritesDecimalsWhereTheyTerminate) {
  EXPECT_EQ(exact_text(0), "0");
  EXPECT_EQ(exact_text(fraction("1/10")), "0.1");
  EXPECT_EQ(exact_text(fraction("-5/4")), "-1.25");
  EXPECT_EQ(exact_text(fraction("3/7")), "3/7");
  EXPECT_EQ(exact_text(240), "240");
  EXPECT_EQ(exact_text(fraction("1/1000000")), "0.000001");
  EXPECT_EQ(exact_text(fraction("1/4000000")), "2.5e-7");
  EXPECT_EQ(exact_text(*parse_exact("1e20")), "100000000000000000000");
  EXPECT_EQ(exact_text(*parse_exact("1e21")), "1e21");
}

TEST(ExactText, ParsesBackToTheSameNumber) {
  test::for_each_case(2000, 2, [](test::Random& random) {
    const auto numerator = static_cast<long>(random() >> 20);
    Rational x(random() % 2 == 0 ? numerator : -numerator, 1 + (random() >> (random() % 64)));
    x.canonicalize();
    EXPECT_EQ(*parse_exact(exact_text(x)), x);
    const Rational scaled = x.get_num() * *parse_exact("1e" + std::to_string(static_cast<int>(random() % 200) - 100));
    EXPECT_EQ(*parse_exact(exact_text(scaled)), scaled);
    EXPECT_EQ(exact_text(scaled).find('/'), std::string::npos);
  });
}

}  // namespace
}  // namespace heraldgauge::model
