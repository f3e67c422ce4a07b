#include "compare/ledger_command.hpp"

#include <algorithm>

#include "compare/ledger_records.hpp"
#include "compare/parallel.hpp"
#include "compare/points.hpp"

namespace heraldgauge::compare {
namespace {

using model::Expected;
using model::Quantity;

// All errors at one point, in the order of the shortcuts and then of the quantities that each touches.
struct PointErrors {
  Case point;
  std::vector<std::vector<DepartureError>> errors;  // [shortcut][quantity]
  std::vector<std::optional<reports::LedgerCost>> costs;
  model::Faults faults;
};

PointErrors errors_at(const model::Scenario& scenario, std::uint64_t index, const std::vector<Chosen>& chosen,
                      const ErrorRequest& request) {
  PointErrors result;
  const auto point = case_at(scenario, index);
  if (!point) return {{}, {}, {}, point.faults()};
  result.point = *point;
  const auto exact = exact_values(*point, request);
  if (!exact) return {{}, {}, {}, exact.faults()};
  for (const Chosen& one : chosen) {
    const ProcessorClock clock;
    result.errors.push_back(errors_against(*exact, *point, one, request));
    result.costs.push_back(cost_of_sample(result.point, one, result.errors.back(), clock.seconds()));
  }
  return result;
}

bool is_listed(const Chosen& chosen, const Quantity& quantity, bool asked) {
  return asked || chosen.departure->touches(quantity);
}

reports::LedgerPoint point_record(const PointErrors& errors, const reports::Parameters& parameters,
                                  const std::vector<Chosen>& chosen, bool asked) {
  reports::LedgerPoint record{parameters, {}};
  for (std::size_t s = 0; s < chosen.size(); ++s) {
    for (const DepartureError& error : errors.errors[s]) {
      if (is_listed(chosen[s], error.quantity, asked)) record.shortcuts.push_back(row_of(chosen[s], error));
    }
  }
  return record;
}

void add_breaches(reports::LedgerReport& report, const PointErrors& errors, const reports::Parameters& parameters,
                  const std::vector<Chosen>& chosen, const Budget& budget) {
  for (std::size_t s = 0; s < chosen.size(); ++s) {
    for (const DepartureError& error : errors.errors[s]) {
      const auto limit = budget.limit(error.quantity, chosen[s].departure->id);
      if (!limit || is_within(error, *limit)) continue;
      report.breaches.push_back({parameters, row_of(chosen[s], error), limit_text(*limit)});
    }
  }
}

}  // namespace

Expected<reports::LedgerReport> ledger_command(const model::Scenario& scenario, const LedgerOptions& options) {
  const auto chosen = chosen_shortcuts(options.shortcuts);
  if (!chosen) return chosen.faults();
  const ErrorRequest request{quantities_to_give(options.quantities, scenario, false)};
  const bool asked = !options.quantities.empty() || !scenario.quantities.empty();
  std::vector<PointErrors> points(scenario.point_count());
  for_each_index(points.size(), options.threads,
                 [&](std::size_t index) { points[index] = errors_at(scenario, index, *chosen, request); });

  model::Faults faults;
  for (const PointErrors& point : points) faults.insert(faults.end(), point.faults.begin(), point.faults.end());
  if (!faults.empty()) return distinct(faults);

  reports::LedgerReport report;
  report.title = scenario.title;
  LedgerSums sums(*chosen, request.quantities);
  for (std::size_t index = 0; index < points.size(); ++index) {
    const auto parameters = parameters_at(scenario, index);
    report.points.push_back(point_record(points[index], parameters, *chosen, asked));
    sums.add(parameters, index, points[index].errors);
    if (options.budget) add_breaches(report, points[index], parameters, *chosen, *options.budget);
  }
  for (const auto& cost : points.front().costs) {
    if (cost) report.costs.push_back(*cost);
  }
  report.summary = sums.summary(asked);
  if (!options.shortcuts.empty() && chosen->size() > 1) {
    const std::size_t worst = sums.worst_point();
    report.pairs = pair_records(points[worst].point, *chosen, points[worst].errors, request);
  }
  return report;
}

}  // namespace heraldgauge::compare
