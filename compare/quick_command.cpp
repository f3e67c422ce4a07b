#include "compare/quick_command.hpp"

#include <algorithm>
#include <cmath>
#include <span>

#include "compare/points.hpp"
#include "compare/status_text.hpp"
#include "fast/evaluate.hpp"
#include "reference/arithmetic/decimal.hpp"

namespace heraldgauge::compare {
namespace {

// Points evaluated together: enough for all threads, few enough that the chains take little memory.
constexpr std::uint64_t block_size = 4096;

// Digits of the printed error bound.
constexpr int bound_digits = 3;

reports::QuickResult record_of(const fast::Value& value) {
  reports::QuickResult record;
  record.quantity = model::name_of(value.quantity);
  record.status = status_text(value.status);
  record.reason = value.reason;
  if (value.status != fast::Status::computed) return record;
  record.value = fast::decimal(value.value);
  if (std::isfinite(value.relative_error_bound)) {
    record.relative_error_bound =
        reference::decimal(model::Rational(value.relative_error_bound), bound_digits, reference::Direction::up);
  }
  return record;
}

void append(QuickAnswer& answer, const reports::Parameters& parameters, std::span<const fast::Value> values) {
  reports::QuickPoint& point = answer.report.points.emplace_back();
  point.parameters = parameters;
  for (const fast::Value& value : values) {
    point.results.push_back(record_of(value));
    if (value.status == fast::Status::declined) answer.complete = false;
  }
}

}  // namespace

model::Expected<QuickAnswer> quick_command(const model::Scenario& scenario, const QuickOptions& options) {
  const std::vector<model::Quantity> quantities = quantities_to_give(options.quantities, scenario, false);
  QuickAnswer answer;
  answer.report.title = scenario.title;
  std::vector<fast::Value> values;
  const std::uint64_t count = scenario.point_count();
  for (std::uint64_t first = 0; first < count; first += block_size) {
    const std::size_t size = std::min(block_size, count - first);
    const auto chains = chains_at(scenario, first, size, options.threads);
    if (!chains) return chains.faults();
    fast::evaluate_all(*chains, quantities, scenario.pattern, options.threads, values);
    for (std::size_t i = 0; i < size; ++i) {
      append(answer, parameters_at(scenario, first + i),
             std::span(values).subspan(i * quantities.size(), quantities.size()));
    }
  }
  return answer;
}

}  // namespace heraldgauge::compare
