// Free click patterns: any click, silence or nothing asked of every detector, so that the elements of two clicks in one
// polarisation and of detectors not looked at count too.

#include <gtest/gtest.h>

#include "tests/fast/campaign.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

constexpr model::Quantity pattern_probability{model::QuantityKind::pattern_probability};

fast::Value value_of(const model::Chain& chain, const model::Pattern& pattern) {
  return fast::evaluate(chain, {pattern_probability}, pattern).front();
}

TEST(FastPattern, RandomPatternsOfRandomChains) {
  Campaign campaign("free patterns", 1e-12);
  for_each_case(60, 51, [&](Random& random) {
    ChainRecipe recipe;
    recipe.largest_station_count = 2;
    recipe.all_alike = random() % 3 == 0;
    const model::Chain chain = random_chain(random, recipe);
    reference::Request request;
    request.quantities = {pattern_probability};
    request.pattern = random_pattern(random, chain.station_count());
    request.digits = 20;
    request.intervals_only = true;
    campaign.add(chain, request);
  });
  EXPECT_EQ(campaign.declined(), 0);
}

// One photon on each side of a station, perfect devices: both leave by the same detector (Hong, Ou and Mandel 1987).
// With sources of one pair each, both detectors of a polarisation can only click if the photons differ.
TEST(FastPattern, IndistinguishablePhotonsLeaveTogether) {
  model::Chain chain = alike_chain(1, "1/2", "1/1", "1/1", "0/1");
  for (model::Source& source : chain.sources) source = {model::SourceKind::ideal_pair, model::Real(1)};
  using Kind = model::Ask::Kind;
  model::Pattern pattern;
  pattern.stations = {
      {model::Ask{Kind::clicks}, model::Ask{Kind::silent}, model::Ask{Kind::clicks}, model::Ask{Kind::silent}}};
  chain.stations[0].indistinguishability = model::Real(0);
  const fast::Value apart = value_of(chain, pattern);
  // Both pairs horizontal: 1/4; then one photon at each detector: 1/2.
  ASSERT_EQ(apart.status, fast::Status::computed);
  EXPECT_NEAR(fast::to_binary64(apart.value), 0.125, 1e-15);
  chain.stations[0].indistinguishability = model::Real(model::Rational(3, 4));
  EXPECT_NEAR(fast::to_binary64(value_of(chain, pattern).value), 0.125 / 4, 1e-15);
}

TEST(FastPattern, SaysWhatItDoesNotServe) {
  const model::Chain chain = alike_chain(0, "1/100", "1/10", "1/2", "1/1000000");
  EXPECT_EQ(fast::evaluate(chain, {pattern_probability}).front().reason, "no pattern is given");
  model::Pattern counting;
  counting.left[0] = {model::Ask::Kind::counts, 1};
  EXPECT_EQ(value_of(chain, counting).reason, "the pattern counts photons");
}

}  // namespace
}  // namespace heraldgauge::test
