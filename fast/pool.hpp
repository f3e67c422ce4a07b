#pragma once
// Memory for the vectors of a kernel, kept by the thread from one run to the next: asking the system anew for every
// vector took longer than filling it.

#include <memory_resource>
#include <vector>

namespace heraldgauge::fast {

// The pool of the calling thread. What comes from it must go back on the same thread.
std::pmr::memory_resource& thread_pool();

template <class T>
struct Pooled {
  using value_type = T;
  Pooled() = default;
  template <class U>
  Pooled(const Pooled<U>&) {}
  T* allocate(std::size_t count) { return static_cast<T*>(thread_pool().allocate(count * sizeof(T), alignof(T))); }
  void deallocate(T* at, std::size_t count) { thread_pool().deallocate(at, count * sizeof(T), alignof(T)); }
  friend bool operator==(const Pooled&, const Pooled&) { return true; }
};

template <class T>
using Buffer = std::vector<T, Pooled<T>>;

}  // namespace heraldgauge::fast
