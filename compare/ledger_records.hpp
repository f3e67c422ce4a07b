#pragma once
// From errors to the ledger's records: rows, sums over points, pairs, costs.

#include <ctime>

#include "compare/budget.hpp"
#include "compare/departure_error.hpp"
#include "reports/record/ledger.hpp"

namespace heraldgauge::compare {

reports::LedgerRow row_of(const Chosen& chosen, const DepartureError& error);

// An error that is certainly within a limit: the larger of the two allowances counts. Where only a number is known,
// without certificate, that number decides; an error that cannot be told is outside.
bool is_within(const DepartureError& error, const Limit& limit);
std::string limit_text(const Limit& limit);

// Sizes of the relative errors over the points of a sweep.
class LedgerSums {
 public:
  LedgerSums(const std::vector<Chosen>& chosen, const std::vector<model::Quantity>& quantities);
  void add(const reports::Parameters& parameters, std::size_t index,
           const std::vector<std::vector<DepartureError>>& errors);
  std::vector<reports::LedgerSummary> summary(bool untouched_too) const;
  // The point of the largest error of all.
  std::size_t worst_point() const { return worst_point_; }

 private:
  struct Sizes {
    std::vector<model::Rational> sizes;
    int certified = 0;
    std::string worst_at;
    Bias bias = Bias::neutral;
  };
  const std::vector<Chosen>& chosen_;
  const std::vector<model::Quantity>& quantities_;
  std::vector<std::vector<Sizes>> sums_;
  model::Rational worst_;
  std::size_t worst_point_ = 0;
};

// Every two of the chosen shortcuts that can be combined, for each quantity: whether their relative errors add, to a
// tenth of the error of both together.
std::vector<reports::LedgerPair> pair_records(const Case& point, const std::vector<Chosen>& chosen,
                                              const std::vector<std::vector<DepartureError>>& errors,
                                              const ErrorRequest& request);

// Processor time of the calling thread since construction.
class ProcessorClock {
 public:
  ProcessorClock() : start_(now()) {}
  double seconds() const { return now() - start_; }

 private:
  static double now() {
    timespec time{};
    clock_gettime(CLOCK_THREAD_CPUTIME_ID, &time);
    return static_cast<double>(time.tv_sec) + 1e-9 * static_cast<double>(time.tv_nsec);
  }
  double start_;
};

// For a sample: its processor time, and that of the certified route to at least the same accuracy.
std::optional<reports::LedgerCost> cost_of_sample(const Case& point, const Chosen& chosen,
                                                  const std::vector<DepartureError>& errors, double seconds);

}  // namespace heraldgauge::compare
