#include "compare/demo/demonstration.hpp"

#include <fmt/format.h>

#include "compare/digits.hpp"
#include "compare/points.hpp"
#include "compare/subset_sum/subset_sum.hpp"
#include "reference/arithmetic/decimal.hpp"
#include "reference/closed_form/direct_pair_link.hpp"
#include "reference/enclose.hpp"

namespace heraldgauge::compare {
namespace {

using model::Expected;
using model::Quantity;
using model::QuantityKind;
using model::Rational;

constexpr int digits = 30;
constexpr reference::Precision closed_form_bits = 256;

Expected<std::vector<reference::Result>> certified(const model::Chain& chain, const std::vector<Quantity>& quantities) {
  reference::Request request;
  request.quantities = quantities;
  request.digits = digits;
  return reference::enclose(chain, request);
}

// A quantity from the signed sum; a fault where the sum does not give it.
Expected<double> from_sum(const SubsetSum& sum, const Quantity& quantity) {
  if (quantity.kind == QuantityKind::herald_probability) return sum.herald;
  if (quantity.kind != QuantityKind::end_pattern) {
    return model::Fault{
        {}, model::name_of(quantity) + " is not in the demonstration", "herald_probability, end patterns"};
  }
  const auto outcome = static_cast<std::size_t>(quantity.outcome);
  return sum.joint[outcome / 4][outcome % 4] / sum.herald;
}

reports::ComparisonRow row_for(const reference::Result& exact, const std::string& compared, const Rational& value) {
  return {model::name_of(exact.quantity), reference::decimals(*exact.enclosure, digits).value, compared,
          agreeing_digits(value, *exact.enclosure)};
}

// Quantities that no herald defines have no row.
Expected<std::vector<reports::ComparisonRow>> rows_at(const model::Chain& chain,
                                                      const std::vector<Quantity>& quantities) {
  const auto exact = certified(chain, quantities);
  if (!exact) return exact.faults();
  const auto sum = subset_sum<double>(chain);
  if (!sum) return sum.faults();
  std::vector<reports::ComparisonRow> rows;
  for (const reference::Result& result : *exact) {
    if (!result.enclosure) continue;
    const auto value = from_sum(*sum, result.quantity);
    if (!value) return value.faults();
    rows.push_back(row_for(result, fmt::format("{:.17g}", *value), Rational(*value)));
  }
  return rows;
}

}  // namespace

Expected<reports::ComparisonReport> against_subset_sum(const model::Scenario& scenario) {
  reports::ComparisonReport report{scenario.title, {}};
  for (std::uint64_t index = 0; index < scenario.point_count(); ++index) {
    const auto chain = model::chain_at(scenario, index);
    if (!chain) return chain.faults();
    const auto rows = rows_at(*chain, scenario.quantities);
    if (!rows) return rows.faults();
    report.points.push_back({parameters_at(scenario, index), *rows});
  }
  return report;
}

Expected<reports::ComparisonReport> against_published_gain(const model::Scenario& scenario) {
  const auto chain = model::chain_at(scenario, 0);
  if (!chain) return chain.faults();
  const reference::Field<reference::Interval> field{closed_form_bits};
  const auto link = reference::closed_form::direct_pair_link_of(field, *chain);
  if (!link) return link.faults();
  const auto exact = certified(*chain, {Quantity{QuantityKind::gain}});
  if (!exact) return exact.faults();
  const Rational published = reference::closed_form::gain(field, *link).lower();
  const std::string printed = reference::decimal(published, digits + 2, reference::Direction::nearest);
  return reports::ComparisonReport{scenario.title, {{{}, {row_for(exact->front(), printed, published)}}}};
}

}  // namespace heraldgauge::compare
