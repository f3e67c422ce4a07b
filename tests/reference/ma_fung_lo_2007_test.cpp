// The printed gain against 40-digit values computed apart from this project's code, and against the determinant
// formula.

#include "reference/closed_form/ma_fung_lo_2007.hpp"

#include <gtest/gtest.h>

#include "reference/enclose.hpp"
#include "tests/support/published.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::reference {
namespace {

// A direct link whose two detectors at each end are alike.
model::Chain direct_link(test::Random& random) {
  test::ChainRecipe recipe;
  recipe.largest_station_count = 0;
  model::Chain chain = test::random_chain(random, recipe);
  chain.left_end.detectors[1] = chain.left_end.detectors[0];
  chain.right_end.detectors[1] = chain.right_end.detectors[0];
  return chain;
}

// Y of an end, given as such or by the dark probability of each detector.
model::Rational dark_count(const test::Texts& parameters, const std::string& end) {
  if (parameters.count("Y0_" + end) != 0) return test::exact_decimal(parameters.at("Y0_" + end));
  const model::Rational quiet = 1 - test::exact_decimal(parameters.at("d_per_detector"));
  return 1 - quiet * quiet;
}

TEST(MaFungLoGain, EqualsTheGainOfTheModel) {
  test::for_each_case(30, 11, [](test::Random& random) {
    const model::Chain chain = direct_link(random);
    Request request;
    request.quantities = {{model::QuantityKind::gain}};
    const auto exact = enclose(chain, request);
    const auto link = pair_link_of(chain);
    ASSERT_TRUE(exact && link);
    const Enclosure& enclosure = *exact->front().enclosure;
    const Interval published = gain(*link, 256);
    EXPECT_TRUE(published.lower() <= enclosure.upper && enclosure.lower <= published.upper())
        << test::describe_chain(chain);
    EXPECT_LT(published.log2_width(), -200);
  });
}

TEST(MaFungLoGain, HasThePublishedValues) {
  const test::PublishedEntry entry = test::published_entry("MFL-gain-qber");
  ASSERT_FALSE(entry.cases.empty());
  for (const test::PublishedCase& one : entry.cases) {
    const auto number = [&](const char* name) { return test::exact_decimal(one.parameters.at(name)); };
    const PairLink link{number("lambda"), number("eta_A"), number("eta_B"), dark_count(one.parameters, "A"),
                        dark_count(one.parameters, "B")};
    const std::string& printed = one.values.at("Q");
    EXPECT_LE(abs(gain(link, 256).lower() - test::exact_decimal(printed)), test::half_unit_of_last_digit(printed));
  }
}

TEST(MaFungLoGain, IsRefusedForOtherChains) {
  EXPECT_FALSE(pair_link_of(test::alike_chain(1, "1/100", "1", "1/2", "0")));
  model::Chain chain = test::alike_chain(0, "1/100", "1", "1/2", "0");
  EXPECT_TRUE(pair_link_of(chain));
  chain.left_end.detectors[1].efficiency = model::Rational(1, 3);
  EXPECT_FALSE(pair_link_of(chain));
}

}  // namespace
}  // namespace heraldgauge::reference
