#include "fast/pool.hpp"

namespace heraldgauge::fast {

std::pmr::memory_resource& thread_pool() {
  constexpr std::pmr::pool_options options{.max_blocks_per_chunk = 16, .largest_required_pool_block = 1 << 20};
  thread_local std::pmr::unsynchronized_pool_resource pool(options);
  return pool;
}

}  // namespace heraldgauge::fast
