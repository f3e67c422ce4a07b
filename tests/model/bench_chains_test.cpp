#include <gtest/gtest.h>

#include <fstream>
#include <sstream>

#include "reference/model/scenario.hpp"
#include "tests/support/random_chain.hpp"

namespace heraldgauge::model {
namespace {

Expected<Chain> chain_of_file(const std::string& name) {
  std::ifstream file(std::string(HERALDGAUGE_SOURCE_DIR) + "/bench/chains/" + name);
  std::ostringstream text;
  text << file.rdbuf();
  const Expected<Scenario> scenario = read_scenario(text.str(), name);
  if (!scenario) return scenario.faults();
  return chain_at(*scenario, 0);
}

struct Trunk {
  std::string file;
  std::size_t stations;
  std::string efficiency;
};

class BenchChains : public testing::TestWithParam<Trunk> {};

TEST_P(BenchChains, AreTheChainsOfTheTests) {
  const Expected<Chain> chain = chain_of_file(GetParam().file);
  ASSERT_TRUE(chain) << describe(chain.faults().front());
  EXPECT_EQ(*chain, test::alike_chain(GetParam().stations, "1/100", "1/10", GetParam().efficiency, "1/1000000"));
}

INSTANTIATE_TEST_SUITE_P(All, BenchChains,
                         testing::Values(Trunk{"trunk2.toml", 2, "1/2"}, Trunk{"trunk3.toml", 3, "1/2"},
                                         Trunk{"trunk8.toml", 8, "1/2"}, Trunk{"trunk100.toml", 100, "1/5"}));

}  // namespace
}  // namespace heraldgauge::model
