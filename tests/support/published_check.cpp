#include "tests/support/published_check.hpp"

#include <gtest/gtest.h>

namespace heraldgauge::test {
namespace {

using model::Rational;
using reference::Interval;

std::string shown(const Interval& x) {
  char* text = nullptr;
  mpfr_asprintf(&text, "[%.50RDg, %.50RUg]", &x.raw()->left, &x.raw()->right);
  const std::string copy(text);
  mpfr_free_str(text);
  return copy;
}

}  // namespace

bool has(const Texts& texts, const std::string& name) { return texts.count(name) > 0; }
Rational rational_of(const Texts& texts, const std::string& name) { return exact_decimal(texts.at(name)); }
Interval interval_of(const Texts& texts, const std::string& name) { return {rational_of(texts, name), published_bits}; }

void expect_published(const Interval& ours, const Texts& values, const std::string& name) {
  ASSERT_TRUE(has(values, name)) << name;
  const std::string& printed = values.at(name);
  EXPECT_TRUE(rounds_to(ours, printed)) << name << " " << printed << " against " << shown(ours);
  ASSERT_TRUE(ours.is_bounded());
  const Rational last_digit = 2 * half_unit_of_last_digit(printed);
  EXPECT_LE((ours.upper() - ours.lower()) * 1000000, last_digit) << name << " " << shown(ours);
}

bool rounds_to(const Interval& x, const std::string& printed) {
  const Rational value = exact_decimal(printed), half = half_unit_of_last_digit(printed);
  return x.is_bounded() && x.lower() >= value - half && x.upper() <= value + half;
}

bool truncates_to(const Interval& x, const std::string& printed) {
  const Rational value = exact_decimal(printed), unit = 2 * half_unit_of_last_digit(printed);
  return x.is_bounded() && x.lower() >= value && x.upper() < value + unit;
}

}  // namespace heraldgauge::test
