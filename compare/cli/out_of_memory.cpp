#include "compare/cli/out_of_memory.hpp"

#include <gmp.h>
#include <unistd.h>

#include <cstdlib>

#include "compare/cli/exit_status.hpp"
#include "compare/cli/output.hpp"

namespace heraldgauge::cli {
namespace {

void* or_end(void* memory) {
  if (memory != nullptr) return memory;
  write_message("heraldgauge: out of memory");
  _exit(static_cast<int>(ExitStatus::machine));
}

void* allocate(std::size_t size) { return or_end(std::malloc(size)); }
void* reallocate(void* memory, std::size_t, std::size_t size) { return or_end(std::realloc(memory, size)); }
void release(void* memory, std::size_t) { std::free(memory); }

}  // namespace

void end_where_memory_runs_out() { mp_set_memory_functions(allocate, reallocate, release); }

}  // namespace heraldgauge::cli
