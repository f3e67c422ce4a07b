#include "compare/parallel.hpp"

#include <tbb/global_control.h>
#include <tbb/parallel_for.h>
#include <tbb/task_arena.h>

namespace heraldgauge::compare {

void for_each_index(std::size_t count, unsigned threads, const std::function<void(std::size_t)>& body) {
  const auto run = [&] { tbb::parallel_for(std::size_t{0}, count, body, tbb::simple_partitioner()); };
  if (threads == 0) return run();
  const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, threads);
  tbb::task_arena arena(static_cast<int>(threads));
  arena.execute(run);
}

}  // namespace heraldgauge::compare
