#pragma once
// Random numbers that are the same on every machine: a fixed generator and own transforms.

#include <cstdint>
#include <random>

namespace heraldgauge::compare {

class Random64 {
 public:
  explicit Random64(std::uint64_t seed) : generator_(seed) {}
  // Uniform in [0, 1), a multiple of 2^-53.
  double uniform() { return static_cast<double>(generator_() >> 11) * 0x1p-53; }
  // 0 .. count - 1; the bias of at most 2^-50 is far below any sampling error.
  std::size_t below(std::size_t count) { return static_cast<std::size_t>(uniform() * static_cast<double>(count)); }

 private:
  std::mt19937_64 generator_;
};

}  // namespace heraldgauge::compare
