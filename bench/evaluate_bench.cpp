// Times of the fast evaluator and of the baselines, each with the relative error it reaches against a certified
// enclosure of the herald probability.

#include <benchmark/benchmark.h>

#include <cmath>
#include <optional>

#include "bench/baselines.hpp"
#include "fast/evaluate.hpp"
#include "reference/enclose.hpp"

namespace heraldgauge::bench {
namespace {

constexpr AlikeChain trunk3{3, 0.01, 0.1, 0.5, 1e-6};

// The same chain with these binary64 numbers exactly.
model::Chain model_chain(const AlikeChain& alike) {
  const auto exact = [](double x) { return model::Real(model::Rational(x)); };
  const model::Detector detector{exact(alike.efficiency), exact(alike.dark)};
  model::Station station;
  station.detectors.fill(detector);
  model::End end;
  end.detectors.fill(detector);
  model::Chain chain;
  const auto sources = static_cast<std::size_t>(alike.stations) + 1;
  chain.sources.assign(sources, {model::SourceKind::squeezed, exact(alike.lam)});
  chain.left_arms.assign(sources, {exact(alike.transmittance)});
  chain.right_arms = chain.left_arms;
  chain.stations.assign(sources - 1, station);
  chain.left_end = chain.right_end = end;
  return chain;
}

double certified_herald() {
  static const double value = [] {
    reference::Request request;
    request.quantities = {{model::QuantityKind::herald_probability}};
    const auto results = reference::enclose(model_chain(trunk3), request);
    return results && results->front().enclosure ? results->front().enclosure->lower.get_d() : 0;
  }();
  return value;
}

void report_error(benchmark::State& state, double value) {
  state.counters["relative_error"] = std::fabs(value / certified_herald() - 1);
}

void all_quantities_one_point(benchmark::State& state) {
  const model::Chain chain = model_chain(trunk3);
  const auto quantities = model::all_quantities(false);
  double herald = 0;
  for (auto _ : state) herald = fast::to_binary64(fast::evaluate(chain, quantities).front().value);
  report_error(state, herald);
}
BENCHMARK(all_quantities_one_point)->Unit(benchmark::kMicrosecond);

// A sweep of 256 transmittances, all quantities, one thread; items are points.
void all_quantities_batch(benchmark::State& state) {
  std::vector<model::Chain> chains(256, model_chain(trunk3));
  for (std::size_t i = 0; i < chains.size(); ++i) {
    const model::Real t(model::Rational(0.1 + 1e-4 * static_cast<double>(i)));
    for (model::Arm& arm : chains[i].left_arms) arm.transmittance = t;
    for (model::Arm& arm : chains[i].right_arms) arm.transmittance = t;
  }
  const auto quantities = model::all_quantities(false);
  double herald = 0;
  for (auto _ : state) {
    herald = fast::to_binary64(fast::evaluate_all(chains, quantities, std::nullopt, 1).front().front().value);
  }
  state.SetItemsProcessed(state.iterations() * 256);
  report_error(state, herald);
}
BENCHMARK(all_quantities_batch)->Unit(benchmark::kMicrosecond);

// One probability, terms with every n_k up to the argument: at 6, 28^4 = 0.6 million.
void herald_by_number_conserving_sum(benchmark::State& state) {
  double herald = 0;
  for (auto _ : state) herald = number_conserving_sum(trunk3, static_cast<int>(state.range(0)));
  report_error(state, herald);
}
BENCHMARK(herald_by_number_conserving_sum)->Arg(2)->Arg(4)->Arg(6)->Unit(benchmark::kMicrosecond);

void herald_by_determinant_subset_sum(benchmark::State& state) {
  double herald = 0;
  for (auto _ : state) herald = determinant_subset_sum(trunk3);
  report_error(state, herald);
}
BENCHMARK(herald_by_determinant_subset_sum)->Unit(benchmark::kMicrosecond);

}  // namespace
}  // namespace heraldgauge::bench

BENCHMARK_MAIN();
