#pragma once
// Random chains for tests: everything unequal unless asked otherwise, all numbers exact binary64 values.

#include <string>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "tests/support/effort.hpp"

namespace heraldgauge::test {

struct ChainRecipe {
  int smallest_station_count = 0;
  int largest_station_count = 3;
  double smallest_lam = 1e-3, largest_lam = 0.3;                    // log-uniform
  double smallest_transmission = 1e-2, largest_transmission = 1.0;  // efficiencies and transmittances, log-uniform
  double smallest_dark = 1e-9, largest_dark = 1e-2;                 // log-uniform, or 0 one time in four
  bool all_alike = false;                                           // one value for each kind of parameter
  bool free_angles = true;                                          // else both analysers at 0
  bool mixed_heralds = true;                                        // else psi+ everywhere
  bool thermal_allowed = true;  // each detector independent or thermal; else independent
};

model::Chain random_chain(Random& random, const ChainRecipe& recipe = {});

// Every detector must click (half of the time), be silent, or is not looked at.
model::Pattern random_pattern(Random& random, std::size_t stations);

// An exact binary64 number, uniform or log-uniform.
double uniform(Random& random, double from, double to);
double log_uniform(Random& random, double from, double to);

// The plain chain of the issues and benchmarks: N stations, everything alike, psi+, analysers at 0, independent dark
// counts. Numbers are fractions such as "1/100" (fractions only, no decimals).
model::Chain alike_chain(std::size_t stations, const std::string& lam, const std::string& transmittance,
                         const std::string& efficiency, const std::string& dark);

// Every number of a chain in one line, for failure messages.
std::string describe_chain(const model::Chain& chain);

}  // namespace heraldgauge::test
