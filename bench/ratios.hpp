#pragma once
// The table of ratios that ends a run.

#include <benchmark/benchmark.h>

#include <map>
#include <string>
#include <vector>

namespace heraldgauge::bench {

// CPU seconds an iteration and the counters of one benchmark.
struct Timing {
  std::string name;
  double seconds = 0;
  std::map<std::string, double> counters;
};

// Prints as the console does, and keeps every timing in the order of the run.
class KeepingReporter : public benchmark::ConsoleReporter {
 public:
  KeepingReporter() : ConsoleReporter(OO_None) {}
  void ReportRuns(const std::vector<Run>& runs) override;
  const std::vector<Timing>& timings() const { return timings_; }
  bool failed() const { return failed_; }

 private:
  std::vector<Timing> timings_;
  bool failed_ = false;
};

// Ratios of what was timed; benchmarks that a filter left out leave their lines out.
void print_ratios(const std::vector<Timing>& timings);

}  // namespace heraldgauge::bench
