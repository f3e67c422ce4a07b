#include "compare/ledger_records.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "compare/chosen.hpp"
#include "compare/status_text.hpp"
#include "reference/arithmetic/decimal.hpp"
#include "reference/model/exact_number.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;
using reference::decimal;
using reference::Direction;

constexpr int error_digits = 6;
constexpr int value_digits = 17;

std::optional<std::string> rounded(const std::optional<Rational>& x) {
  return x ? std::optional<std::string>(decimal(*x, error_digits, Direction::nearest)) : std::nullopt;
}

std::string place_text(const reports::Parameters& parameters) {
  std::string text;
  for (const auto& [key, value] : parameters) text += (text.empty() ? "" : ", ") + key + " = " + value;
  return text;
}

// The size below which a share of the sorted sizes lies (nearest rank).
Rational percentile(const std::vector<Rational>& sorted, std::size_t percent) {
  const std::size_t rank = (percent * sorted.size() + 99) / 100;
  return sorted[std::max<std::size_t>(rank, 1) - 1];
}

std::string verdict_of(const DepartureError& together, const DepartureError& first, const DepartureError& second) {
  if (!together.certified || !first.certified || !second.certified) return "undecided";
  const Rational least = together.certified->lower - first.certified->upper - second.certified->upper;
  const Rational most = together.certified->upper - first.certified->lower - second.certified->lower;
  const Rational size_most = std::max<Rational>(abs(together.certified->lower), abs(together.certified->upper));
  const Rational tenth = size_most / 10;
  if (least > tenth || most < -tenth) return "does not add";
  return least >= -tenth && most <= tenth ? "adds" : "undecided";
}

}  // namespace

reports::LedgerRow row_of(const Chosen& chosen, const DepartureError& error) {
  reports::LedgerRow row;
  row.shortcut = chosen.departure->id;
  row.setting = setting_text(chosen.setting);
  row.quantity = model::name_of(error.quantity);
  row.status = status_text(error.status);
  row.reason = error.reason;
  row.effort = error.effort;
  row.direction = text_of(error.bias);
  if (error.value) row.value = decimal(*error.value, value_digits, Direction::nearest);
  row.relative_error = rounded(error.relative);
  if (error.relative) row.digits_left = error.digits_left;
  if (!error.certified) return row;
  row.relative_error_lower = decimal(error.certified->lower, error_digits, Direction::down);
  row.relative_error_upper = decimal(error.certified->upper, error_digits, Direction::up);
  return row;
}

bool is_within(const DepartureError& error, const Limit& limit) {
  if (error.status != fast::Status::computed || !error.exact || !error.value) return true;
  const Rational size = std::max<Rational>(abs(error.exact->lower), abs(error.exact->upper));
  const Rational least = error.exact->lower <= 0 && error.exact->upper >= 0
                             ? Rational(0)
                             : std::min<Rational>(abs(error.exact->lower), abs(error.exact->upper));
  Rational allowed = limit.relative ? Rational(*limit.relative * least) : Rational(0);
  if (limit.absolute) allowed = std::max(allowed, *limit.absolute);
  if (error.certified) {
    return std::max<Rational>(abs(error.certified->lower), abs(error.certified->upper)) * size <= allowed;
  }
  if (error.relative) return abs(*error.relative) * size <= allowed;
  return std::max<Rational>(abs(*error.value - error.exact->lower), abs(*error.value - error.exact->upper)) <= allowed;
}

std::string limit_text(const Limit& limit) {
  std::string text;
  if (limit.relative) text += "relative " + model::exact_text(*limit.relative);
  if (limit.absolute) text += (text.empty() ? "" : ", ") + ("absolute " + model::exact_text(*limit.absolute));
  return text;
}

LedgerSums::LedgerSums(const std::vector<Chosen>& chosen, const std::vector<model::Quantity>& quantities)
    : chosen_(chosen), quantities_(quantities), sums_(chosen.size(), std::vector<Sizes>(quantities.size())) {}

void LedgerSums::add(const reports::Parameters& parameters, std::size_t index,
                     const std::vector<std::vector<DepartureError>>& errors) {
  for (std::size_t s = 0; s < errors.size(); ++s) {
    for (std::size_t q = 0; q < errors[s].size(); ++q) {
      const DepartureError& error = errors[s][q];
      if (!error.relative) continue;
      Sizes& sums = sums_[s][q];
      const Rational size = abs(*error.relative);
      if (sums.sizes.empty() || size > *std::max_element(sums.sizes.begin(), sums.sizes.end())) {
        sums.worst_at = place_text(parameters);
        sums.bias = error.bias;
      }
      sums.sizes.push_back(size);
      if (error.certified) ++sums.certified;
      if (size > worst_) {
        worst_ = size;
        worst_point_ = index;
      }
    }
  }
}

std::vector<reports::LedgerSummary> LedgerSums::summary(bool untouched_too) const {
  std::vector<reports::LedgerSummary> records;
  for (std::size_t s = 0; s < sums_.size(); ++s) {
    for (std::size_t q = 0; q < sums_[s].size(); ++q) {
      const Sizes& sums = sums_[s][q];
      if (sums.sizes.empty() || !(untouched_too || chosen_[s].departure->touches(quantities_[q]))) continue;
      std::vector<Rational> sorted = sums.sizes;
      std::sort(sorted.begin(), sorted.end());
      records.push_back({chosen_[s].departure->id, setting_text(chosen_[s].setting), model::name_of(quantities_[q]),
                         static_cast<int>(sorted.size()), sums.certified, rounded(sorted.back()),
                         rounded(percentile(sorted, 50)), rounded(percentile(sorted, 90)), sums.worst_at,
                         text_of(sums.bias)});
    }
  }
  return records;
}

std::vector<reports::LedgerPair> pair_records(const Case& point, const std::vector<Chosen>& chosen,
                                              const std::vector<std::vector<DepartureError>>& errors,
                                              const ErrorRequest& request) {
  std::vector<reports::LedgerPair> records;
  const auto exact = exact_values(point, request);
  if (!exact) return records;
  for (std::size_t i = 0; i < chosen.size(); ++i) {
    for (std::size_t j = i + 1; j < chosen.size(); ++j) {
      auto both = combined(chosen[i], chosen[j]);
      if (!both) both = combined(chosen[j], chosen[i]);
      if (!both) continue;
      const auto together = errors_against(*exact, point, {&*both, {}}, request);
      for (std::size_t q = 0; q < request.quantities.size(); ++q) {
        const DepartureError &first = errors[i][q], &second = errors[j][q];
        if (!together[q].relative || !first.relative || !second.relative) continue;
        if (*first.relative == 0 || *second.relative == 0) continue;
        records.push_back({chosen[i].departure->id, chosen[j].departure->id, model::name_of(request.quantities[q]),
                           rounded(together[q].relative), rounded(Rational(*first.relative + *second.relative)),
                           verdict_of(together[q], first, second)});
      }
    }
  }
  return records;
}

std::optional<reports::LedgerCost> cost_of_sample(const Case& point, const Chosen& chosen,
                                                  const std::vector<DepartureError>& errors, double seconds) {
  const auto sampled =
      std::find_if(errors.begin(), errors.end(), [](const auto& error) { return !error.effort.empty(); });
  if (sampled == errors.end()) return std::nullopt;
  ErrorRequest same{{}, 3};
  for (const DepartureError& error : errors) {
    if (chosen.departure->touches(error.quantity)) same.quantities.push_back(error.quantity);
  }
  const ProcessorClock clock;
  const auto exact = exact_values(point, same);
  if (!exact) return std::nullopt;
  return reports::LedgerCost{chosen.departure->id, sampled->effort, fmt::format("{:.3g}", seconds),
                             fmt::format("{:.3g}", clock.seconds())};
}

}  // namespace heraldgauge::compare
