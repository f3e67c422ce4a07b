#pragma once
// Independent pieces of work on several threads.

#include <cstddef>
#include <functional>

namespace heraldgauge::compare {

// Calls body(0) .. body(count - 1), each once, in any order, on `threads` threads (0: as many as the machine has). What
// the body writes must belong to its own index. An exception of the body reaches the caller.
void for_each_index(std::size_t count, unsigned threads, const std::function<void(std::size_t)>& body);

}  // namespace heraldgauge::compare
