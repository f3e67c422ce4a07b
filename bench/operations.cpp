#include "bench/operations.hpp"

#include <stdexcept>
#include <variant>

#include "fast/operation_count.hpp"
#include "fast/planner.hpp"

namespace heraldgauge::bench {
namespace {

constexpr int accumulators = 12;  // enough to hide the latency of both operations, and no more than fit in registers

using TwoDoubles = double __attribute__((vector_size(16)));
using FourDoubles = double __attribute__((vector_size(32)));
using EightDoubles = double __attribute__((vector_size(64)));

template <class Vector>
__attribute__((always_inline)) inline double multiply_and_add(long steps, double& sink) {
  const Vector factor = Vector{} + (1 - 0x1p-20);
  const Vector added = Vector{} + 0x1p-20;
  Vector sums[accumulators] = {};
  for (long i = 0; i < steps; ++i) {
    for (Vector& sum : sums) sum = sum * factor + added;
  }
  for (const Vector& sum : sums) sink += sum[0];
  return static_cast<double>(steps) * accumulators * static_cast<double>(sizeof(Vector) / sizeof(double));
}

__attribute__((target("avx512f,avx512dq,avx512vl"))) double in_512_bits(long steps, double& sink) {
  return multiply_and_add<EightDoubles>(steps, sink);
}
__attribute__((target("avx2"))) double in_256_bits(long steps, double& sink) {
  return multiply_and_add<FourDoubles>(steps, sink);
}

}  // namespace

double multiply_adds(const model::Chain& chain, const std::vector<model::Quantity>& quantities) {
  const auto numbers = fast::numbers_of(chain);
  if (const auto* reason = std::get_if<std::string>(&numbers)) throw std::runtime_error(*reason);
  const auto& served = std::get<fast::ChainNumbers>(numbers);
  const fast::ExactModes modes = fast::modes_of(served);
  const auto cutoffs = fast::first_cutoffs(served, modes);
  if (!cutoffs) throw std::runtime_error("more pairs a source than the fast evaluator keeps");
  const fast::Plan plan = fast::make_plan(served, modes, fast::needs_of(quantities), *cutoffs).plan;
  return fast::multiply_adds(plan);
}

double multiply_adds_at_peak(long steps, double& sink) {
  if (__builtin_cpu_supports("avx512f") && __builtin_cpu_supports("avx512dq") && __builtin_cpu_supports("avx512vl")) {
    return in_512_bits(steps, sink);
  }
  if (__builtin_cpu_supports("avx2")) return in_256_bits(steps, sink);
  return multiply_and_add<TwoDoubles>(steps, sink);
}

}  // namespace heraldgauge::bench
