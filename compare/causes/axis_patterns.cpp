// A parameter read in another unit or from a displaced origin: given = exact value at c * p, or at p + c.

#include <algorithm>
#include <cmath>
#include <functional>

#include "compare/causes/evaluate.hpp"
#include "compare/causes/overlap.hpp"
#include "compare/causes/patterns.hpp"
#include "compare/parallel.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

// Targets whose own positions are sought, and how finely.
constexpr std::size_t most_probes = 4;
constexpr std::size_t least_evidence = 3;
constexpr int grid_points = 17;
constexpr double largest_factor = 12;  // factors are sought from its reciprocal to it
constexpr int most_steps = 24;
constexpr double slope_step = 1e-5;
constexpr double small_share = 1e-3;  // of a tolerance

enum class Change { factor, offset };

class AxisSearch {
 public:
  AxisSearch(const Data& data, std::size_t parameter, Change change)
      : data_(data), parameter_(parameter), change_(change) {}

  std::vector<Hypothesis> search() const {
    std::vector<Span> spans;
    for (const std::size_t target : probes()) {
      for (const Span& span : spans_of(target)) spans.push_back(span);
    }
    const auto overlap = largest_overlap(spans);
    if (!overlap || overlap->count < least_evidence) return {};
    const ShortNumber amount =
        shortest_in(overlap->common, change_ == Change::factor ? Meaning::factor : Meaning::amount);
    return {hypothesis(amount)};
  }

 private:
  const std::string& key() const { return data_.cases.front().changes[parameter_].first; }
  const Rational& position(std::size_t target) const {
    return std::get<Rational>(data_.cases[data_.targets[target].point].changes[parameter_].second);
  }

  // Wrong targets spread over the table.
  std::vector<std::size_t> probes() const {
    std::vector<std::size_t> wrong;
    for (std::size_t i = 0; i < data_.targets.size(); ++i) {
      if (data_.targets[i].wrong) wrong.push_back(i);
    }
    const std::size_t count = std::min(most_probes, wrong.size());
    std::vector<std::size_t> chosen;
    for (std::size_t i = 0; i < count; ++i)
      chosen.push_back(wrong[count == 1 ? 0 : i * (wrong.size() - 1) / (count - 1)]);
    return chosen;
  }

  // The value that a target would have with its parameter changed by the amount; nothing where that is out of range.
  std::optional<double> value_at(std::size_t target, double amount) const {
    Changes changes = data_.cases[data_.targets[target].point].changes;
    Rational& moved = std::get<Rational>(changes[parameter_].second);
    moved = change_ == Change::factor ? Rational(moved * Rational(amount)) : Rational(moved + Rational(amount));
    const auto point = case_with(*data_.cases.front().scenario, changes);
    if (!point) return std::nullopt;
    const Value value = values_of_model(*point, {data_.quantities[data_.targets[target].quantity]}).front();
    if (value.status != fast::Status::computed) return std::nullopt;
    return in_unit_of(data_.targets[target], value.value);
  }

  std::vector<double> grid(std::size_t target) const {
    std::vector<double> amounts;
    const double reach = std::abs(position(target).get_d());
    for (int i = 0; i < grid_points; ++i) {
      const double share = 2.0 * i / (grid_points - 1) - 1;
      amounts.push_back(change_ == Change::factor ? std::pow(largest_factor, share) : reach * share);
    }
    return amounts;
  }

  // An amount with what the value there exceeds the given one by.
  struct Sided {
    double amount, off;
  };

  // Amounts at which the target would be as given, each with the span that its tolerance leaves.
  std::vector<Span> spans_of(std::size_t target) const {
    std::vector<Span> spans;
    std::optional<Sided> before;
    for (const double amount : grid(target)) {
      const auto value = value_at(target, amount);
      std::optional<Sided> here;
      if (value) here = Sided{amount, *value - data_.targets[target].given};
      if (here && before && here->off != before->off && here->off * before->off <= 0) {
        if (const auto span = span_round(target, *before, *here)) spans.push_back(*span);
      }
      before = here;
    }
    return spans;
  }

  // False position with halved weights (Illinois): the amount between two at which the value is as given.
  std::optional<double> root_between(std::size_t target, Sided low, Sided high) const {
    for (int step = 0; step < most_steps; ++step) {
      const double middle = high.amount - high.off * (high.amount - low.amount) / (high.off - low.off);
      const auto value = value_at(target, middle);
      if (!value) return std::nullopt;
      const double off = *value - data_.targets[target].given;
      if (std::abs(off) < small_share * data_.targets[target].above || middle == high.amount) return middle;
      if (off * high.off < 0) {
        low = high;
      } else {
        low.off /= 2;
      }
      high = {middle, off};
    }
    return high.amount;
  }

  std::optional<Span> span_round(std::size_t target, const Sided& low, const Sided& high) const {
    const auto root = root_between(target, low, high);
    if (!root) return std::nullopt;
    const Target& wanted = data_.targets[target];
    const double step = slope_step * std::max(std::abs(*root), slope_step);
    const auto above = value_at(target, *root + step), below = value_at(target, *root - step);
    if (!above || !below || *above == *below) return std::nullopt;
    const double slope = std::abs(*above - *below) / (2 * step);
    const double reach = std::max(wanted.above, wanted.below) / slope;
    return Span{*root - reach, *root + reach};
  }

  Hypothesis hypothesis(const ShortNumber& amount) const {
    Hypothesis found;
    const bool factor = change_ == Change::factor;
    found.parts = {{factor ? "axis-factor" : "axis-offset", "pattern",
                    key() + (factor ? " times " : " plus ") + amount.text,
                    factor ? "The numbers belong to a parameter in another unit."
                           : "The numbers belong to a displaced parameter."}};
    found.complexity = complexity_of_pattern + complexity_of_setting;
    for (std::size_t i = 0; i < data_.targets.size(); ++i) found.prediction.push_back(value_at(i, amount.value));
    found.score = score(data_, found.prediction);
    return found;
  }

  const Data& data_;
  std::size_t parameter_;
  Change change_;
};

}  // namespace

std::vector<Hypothesis> axis_patterns(const Data& data, unsigned threads) {
  std::vector<AxisSearch> searches;
  for (std::size_t i = 0; i < data.cases.front().changes.size(); ++i) {
    const bool number = std::holds_alternative<Rational>(data.cases.front().changes[i].second);
    const bool count = data.cases.front().changes[i].first == "chain.stations";
    if (!number || count) continue;
    searches.emplace_back(data, i, Change::factor);
    searches.emplace_back(data, i, Change::offset);
  }
  std::vector<std::vector<Hypothesis>> found(searches.size());
  for_each_index(searches.size(), threads, [&](std::size_t i) { found[i] = searches[i].search(); });
  std::vector<Hypothesis> all;
  for (auto& some : found) {
    for (Hypothesis& one : some) all.push_back(std::move(one));
  }
  return all;
}

}  // namespace heraldgauge::compare
