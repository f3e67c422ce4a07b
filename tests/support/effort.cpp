#include "tests/support/effort.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <string>

namespace heraldgauge::test {
namespace {

double effort() {
  const char* text = std::getenv("HERALDGAUGE_TEST_EFFORT");
  const double value = text == nullptr ? 1.0 : std::strtod(text, nullptr);
  return value > 0 ? value : 1.0;
}

std::uint64_t from_environment(const char* name, std::uint64_t otherwise) {
  const char* text = std::getenv(name);
  return text == nullptr ? otherwise : std::strtoull(text, nullptr, 10);
}

}  // namespace

int scaled(int cases) { return std::max(1, static_cast<int>(std::lround(cases * effort()))); }

void for_each_case(int cases, std::uint64_t seed, const std::function<void(Random&)>& body) {
  const std::uint64_t used_seed = from_environment("HERALDGAUGE_TEST_SEED", seed);
  const std::uint64_t all = ~std::uint64_t{0};
  const std::uint64_t only = from_environment("HERALDGAUGE_TEST_CASE", all);
  const auto count = static_cast<std::uint64_t>(scaled(cases));
  for (std::uint64_t index = only == all ? 0 : only; index < (only == all ? count : only + 1); ++index) {
    SCOPED_TRACE("replay with HERALDGAUGE_TEST_SEED=" + std::to_string(used_seed) +
                 " HERALDGAUGE_TEST_CASE=" + std::to_string(index));
    std::seed_seq mixed{used_seed, used_seed >> 32, index, index >> 32};
    Random random(mixed);
    body(random);
    if (testing::Test::HasFatalFailure()) return;
  }
}

}  // namespace heraldgauge::test
