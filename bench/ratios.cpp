#include "bench/ratios.hpp"

#include <algorithm>
#include <array>
#include <cstdio>

namespace heraldgauge::bench {
namespace {

using Timings = std::vector<Timing>;

const std::string single_point = "all_quantities_one_point";
const std::string batch = "all_quantities_batch";
const std::string peak = "multiply_add_peak";

const Timing* find(const Timings& timings, const std::string& name) {
  const auto found = std::find_if(timings.begin(), timings.end(), [&](const Timing& one) { return one.name == name; });
  return found == timings.end() ? nullptr : &*found;
}

// Seconds for all quantities of one point, or 0 where they were not timed.
double seconds_a_point(const Timings& timings, const std::string& name) {
  const Timing* timing = find(timings, name);
  return timing == nullptr ? 0 : timing->seconds / timing->counters.at("points");
}

std::string ratio(double seconds, double to) {
  std::array<char, 32> text{};
  std::snprintf(text.data(), text.size(), "%.3g", seconds / to);
  return to > 0 ? text.data() : "-";
}

void print_baselines(const Timings& timings) {
  const double one = seconds_a_point(timings, single_point);
  const double many = seconds_a_point(timings, batch);
  std::printf("\n%-44s  how many times the fast evaluator's, all quantities\n", "CPU time");
  std::printf("%-44s%14s%14s%16s\n", "", "single point", "in a batch", "relative error");
  for (const Timing& timing : timings) {
    if (timing.name == single_point || timing.name == batch || timing.name == peak) continue;
    std::printf("%-44s%14s%14s%16.1e\n", timing.name.c_str(), ratio(timing.seconds, one).c_str(),
                ratio(timing.seconds, many).c_str(), timing.counters.at("relative_error"));
  }
}

void print_peak(const Timings& timings) {
  const Timing* measured = find(timings, peak);
  if (measured == nullptr) return;
  const double rate = measured->counters.at("multiply_adds") / measured->seconds;
  std::printf("\nmeasured peak of one core: %.3g multiply-adds a second\n", rate);
  for (const std::string& name : {single_point, batch}) {
    const Timing* timing = find(timings, name);
    if (timing == nullptr) continue;
    const double count = timing->counters.at("multiply_adds");
    const double seconds = seconds_a_point(timings, name);
    std::printf("%s: %.4g multiply-adds a point, %.3g a second, 1/%.3g of the peak\n", name.c_str(), count,
                count / seconds, rate * seconds / count);
  }
}

}  // namespace

void KeepingReporter::ReportRuns(const std::vector<Run>& runs) {
  ConsoleReporter::ReportRuns(runs);
  for (const Run& run : runs) {
    failed_ = failed_ || run.error_occurred;
    if (run.error_occurred || run.run_type != Run::RT_Iteration) continue;
    Timing timing{run.benchmark_name(), run.cpu_accumulated_time / static_cast<double>(run.iterations), {}};
    for (const auto& [name, value] : run.counters) timing.counters[name] = value;
    timings_.push_back(std::move(timing));
  }
}

void print_ratios(const Timings& timings) {
  print_baselines(timings);
  print_peak(timings);
}

}  // namespace heraldgauge::bench
