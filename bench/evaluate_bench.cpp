// Times of the fast evaluator, of the certified one, and of what people compute today, each with the relative error it
// reaches against a certified enclosure. CPU time; every ratio comes from one run.

#include <benchmark/benchmark.h>

#include <algorithm>
#include <cmath>
#include <optional>
#include <string>

#include "bench/chains.hpp"
#include "bench/nested_sum.hpp"
#include "bench/operations.hpp"
#include "bench/ratios.hpp"
#include "bench/state_vector.hpp"
#include "bench/subset_sum.hpp"
#include "fast/evaluate.hpp"
#include "reference/enclose.hpp"

namespace heraldgauge::bench {
namespace {

using model::QuantityKind;

constexpr std::size_t batch_points = 256;

model::Chain trunk3() { return chain_of("trunk3"); }
// One station, as state vectors can hold it.
model::Chain one_station() { return chain_of("trunk2", {{"chain.stations", "1"}}); }
// Where no-click probabilities differ little: the terms of a signed sum cancel.
model::Chain low_noise() {
  return chain_of("trunk3", {{"station.detector.efficiency", "0.01"},
                             {"station.detector.dark_probability", "1e-7"},
                             {"end.detector.efficiency", "0.01"},
                             {"end.detector.dark_probability", "1e-7"}});
}

double certified(const model::Chain& chain, const model::Quantity& quantity) {
  reference::Request request;
  request.quantities = {quantity};
  return reference::enclose(chain, request)->front().enclosure->lower.get_d();
}
double certified_herald(const model::Chain& chain) { return certified(chain, {QuantityKind::herald_probability}); }

// The herald, plus alone at both ends, analysers at 45 degrees.
double certified_pattern(model::Chain chain) {
  chain.left_end.analyser_deg = chain.right_end.analyser_deg = model::Rational(analyser_deg);
  return certified_herald(chain) * certified(chain, {QuantityKind::end_pattern, 0b1010});
}

void report_error(benchmark::State& state, double value, double exact) {
  state.counters["relative_error"] = std::fabs(value / exact - 1);
}

// Of the fast evaluator, which promises this much.
void require_accuracy(benchmark::State& state, double value, double exact) {
  report_error(state, value, exact);
  if (!(std::fabs(value / exact - 1) <= 1e-12)) state.SkipWithError("the fast evaluator is wrong by more than 1e-12");
}

const fast::Value& value_of(const std::vector<fast::Value>& values, QuantityKind kind) {
  return *std::find_if(values.begin(), values.end(), [&](const auto& one) { return one.quantity.kind == kind; });
}

void report_points(benchmark::State& state, std::size_t points, const model::Chain& chain) {
  state.counters["points"] = static_cast<double>(points);
  state.counters["multiply_adds"] = multiply_adds(chain, model::all_quantities(false));
}

void all_quantities_one_point(benchmark::State& state) {
  const model::Chain chain = trunk3();
  const auto quantities = model::all_quantities(false);
  double herald = 0;
  for (auto _ : state) herald = fast::to_binary64(fast::evaluate(chain, quantities).front().value);
  require_accuracy(state, herald, certified_herald(chain));
  report_points(state, 1, chain);
}
BENCHMARK(all_quantities_one_point)->Unit(benchmark::kMicrosecond);

void herald_one_point(benchmark::State& state) {
  const model::Chain chain = trunk3();
  double herald = 0;
  for (auto _ : state) {
    herald = fast::to_binary64(fast::evaluate(chain, {{QuantityKind::herald_probability}}).front().value);
  }
  require_accuracy(state, herald, certified_herald(chain));
}
BENCHMARK(herald_one_point)->Unit(benchmark::kMicrosecond);

// Other numbers of stations: the argument.
void all_quantities_other_trunk(benchmark::State& state) {
  const model::Chain chain = chain_of("trunk" + std::to_string(state.range(0)));
  const auto quantities = model::all_quantities(false);
  double gain = 0;
  for (auto _ : state) {
    const std::vector<fast::Value> values = fast::evaluate(chain, quantities);
    gain = fast::to_binary64(value_of(values, QuantityKind::gain).value);
  }
  require_accuracy(state, gain, certified(chain, {QuantityKind::gain}));
}
BENCHMARK(all_quantities_other_trunk)->Arg(2)->Arg(8)->Arg(100)->Unit(benchmark::kMicrosecond);

// A sweep of transmittances, one thread.
void all_quantities_batch(benchmark::State& state) {
  std::vector<model::Chain> chains(batch_points, trunk3());
  for (std::size_t i = 0; i < chains.size(); ++i) {
    const model::Rational t(static_cast<long>(1000 + i), 10000L);
    for (auto* arms : {&chains[i].left_arms, &chains[i].right_arms}) {
      for (model::Arm& arm : *arms) arm.transmittance = t;
    }
  }
  const auto quantities = model::all_quantities(false);
  double herald = 0;
  std::vector<fast::Value> values;
  for (auto _ : state) {
    fast::evaluate_all(chains, quantities, std::nullopt, 1, values);
    herald = fast::to_binary64(values.front().value);
  }
  require_accuracy(state, herald, certified_herald(chains.front()));
  report_points(state, batch_points, chains.front());
}
BENCHMARK(all_quantities_batch)->Unit(benchmark::kMicrosecond);

// Everything that the fast evaluator gives, certified to 20 digits.
void all_quantities_certified(benchmark::State& state) {
  const model::Chain chain = trunk3();
  reference::Request request;
  request.quantities = model::all_quantities(false);
  request.digits = 20;
  for (auto _ : state) benchmark::DoNotOptimize(reference::enclose(chain, request));
  state.counters["relative_error"] = 1e-20;
}
BENCHMARK(all_quantities_certified)->Unit(benchmark::kMicrosecond);

// One probability by a baseline, with its error. The benchmark's argument is the second of `baseline`.
void time_baseline(benchmark::State& state, const model::Chain& chain, double exact,
                   double (*baseline)(const AlikeChain&, int)) {
  const AlikeChain numbers = alike(chain);
  double value = 0;
  for (auto _ : state) value = baseline(numbers, static_cast<int>(state.range(0)));
  report_error(state, value, exact);
}

// Arguments: pairs a mode.
void pattern_by_plain_nested_sum(benchmark::State& state) {
  time_baseline(state, trunk3(), certified_pattern(trunk3()), plain_nested_sum);
}
BENCHMARK(pattern_by_plain_nested_sum)->Arg(1)->Arg(2)->Unit(benchmark::kMicrosecond);

void pattern_by_number_conserving_sum(benchmark::State& state) {
  time_baseline(state, trunk3(), certified_pattern(trunk3()), number_conserving_sum);
}
BENCHMARK(pattern_by_number_conserving_sum)->Arg(2)->Arg(4)->Arg(6)->Unit(benchmark::kMicrosecond);

void pattern_by_number_conserving_sum_carried(benchmark::State& state) {
  time_baseline(state, trunk3(), certified_pattern(trunk3()), number_conserving_sum_carried);
}
BENCHMARK(pattern_by_number_conserving_sum_carried)->Arg(2)->Arg(4)->Arg(6)->Unit(benchmark::kMicrosecond);

// One station. Argument: photons a mode.
void one_station_herald_by_state_vector(benchmark::State& state) {
  time_baseline(state, one_station(), certified_herald(one_station()), state_vector_herald);
}
BENCHMARK(one_station_herald_by_state_vector)->Arg(1)->Arg(2)->Unit(benchmark::kMicrosecond);

void time_subset_sum(benchmark::State& state, const model::Chain& chain) {
  const AlikeChain numbers = alike(chain);
  double herald = 0;
  for (auto _ : state) herald = determinant_subset_sum(numbers);
  report_error(state, herald, certified_herald(chain));
}
void herald_by_determinant_subset_sum(benchmark::State& state) { time_subset_sum(state, trunk3()); }
BENCHMARK(herald_by_determinant_subset_sum)->Unit(benchmark::kMicrosecond);
void low_noise_herald_by_determinant_subset_sum(benchmark::State& state) { time_subset_sum(state, low_noise()); }
BENCHMARK(low_noise_herald_by_determinant_subset_sum)->Unit(benchmark::kMicrosecond);

void multiply_add_peak(benchmark::State& state) {
  double count = 0;
  double sink = 0;
  for (auto _ : state) count = multiply_adds_at_peak(100000, sink);
  benchmark::DoNotOptimize(sink);
  state.counters["multiply_adds"] = count;
}
BENCHMARK(multiply_add_peak)->Unit(benchmark::kMicrosecond);

}  // namespace
}  // namespace heraldgauge::bench

int main(int argc, char** argv) {
  benchmark::Initialize(&argc, argv);
  if (benchmark::ReportUnrecognizedArguments(argc, argv)) return 2;
  heraldgauge::bench::KeepingReporter reporter;
  benchmark::RunSpecifiedBenchmarks(&reporter);
  heraldgauge::bench::print_ratios(reporter.timings());
  return reporter.failed() ? 1 : 0;
}
