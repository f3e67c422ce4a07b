#include "compare/frontier_command.hpp"

#include "compare/parallel.hpp"
#include "reference/arithmetic/decimal.hpp"
#include "reference/model/exact_number.hpp"

namespace heraldgauge::compare {
namespace {

using model::Expected;
using model::Fault;
using model::Faults;
using model::Rational;

constexpr int bisections = 20;  // the bracket is 2^-20 of the range
constexpr int first_digits = 6;
constexpr int last_digits = 30;
constexpr int error_digits = 6;

enum class Side { inside, outside, undecided };

struct Sighting {
  Side side;
  std::optional<Rational> error;
};

class Frontier {
 public:
  Frontier(const model::Scenario& scenario, const Chosen& chosen, const FrontierOptions& options)
      : scenario_(scenario), chosen_(chosen), options_(options) {}

  // Digits are raised until the error is certainly on one side of E.
  Expected<Sighting> at(const std::vector<std::pair<std::string, model::Value>>& changes) const {
    const auto point = case_with(scenario_, changes);
    if (!point) return point.faults();
    Sighting sighting{Side::undecided, std::nullopt};
    for (int digits = first_digits; digits <= last_digits; digits *= 2) {
      const auto errors = errors_of(*point, chosen_, {{options_.quantity}, digits});
      if (!errors) return errors.faults();
      const DepartureError& error = errors->front();
      sighting.error = error.relative;
      if (error.certainly_within(options_.error)) sighting.side = Side::inside;
      if (error.certainly_beyond(options_.error)) sighting.side = Side::outside;
      if (sighting.side != Side::undecided || !error.certified) return sighting;
    }
    return sighting;
  }
  Expected<Sighting> at(const Rational& x) const { return at({{options_.axes.front().key, x}}); }

 private:
  const model::Scenario& scenario_;
  const Chosen& chosen_;
  const FrontierOptions& options_;
};

// A key that takes whole numbers only is bisected on them.
bool takes_integers(const std::string& key) { return key == "chain.stations"; }

Rational middle_of(const Rational& a, const Rational& b, bool integers) {
  const Rational middle = (a + b) / 2;
  if (integers) {
    model::Integer whole;
    mpz_fdiv_q(whole.get_mpz_t(), middle.get_num_mpz_t(), middle.get_den_mpz_t());
    return whole;
  }
  const auto near = model::nearest_binary64(middle);
  return near ? *near : middle;
}

Expected<FrontierAnswer> bracket(const Frontier& frontier, const FrontierOptions& options, FrontierAnswer answer) {
  const FrontierAxis& axis = options.axes.front();
  const bool integers = takes_integers(axis.key);
  Rational from = axis.from, to = axis.to;
  const auto first = frontier.at(from);
  if (!first) return first.faults();
  const auto last = frontier.at(to);
  if (!last) return last.faults();
  const auto record = [&](const Rational& x, Side side) {
    (side == Side::inside ? answer.report.inside : answer.report.outside) = model::exact_text(x);
  };
  for (const auto& [x, side] : {std::pair{from, first->side}, std::pair{to, last->side}}) {
    if (side != Side::undecided) record(x, side);
  }
  answer.decided = first->side != Side::undecided && last->side != Side::undecided;
  if (!answer.decided || first->side == last->side) return answer;
  for (int i = 0; i < bisections; ++i) {
    const Rational middle = middle_of(from, to, integers);
    if (middle == from || middle == to) break;
    const auto here = frontier.at(middle);
    if (!here) return here.faults();
    if (here->side == Side::undecided) break;
    (here->side == first->side ? from : to) = middle;
    record(middle, here->side);
  }
  return answer;
}

Rational map_value(const FrontierAxis& axis, long i, long points) {
  return axis.from + (axis.to - axis.from) * i / (points - 1);
}

std::string within_text(Side side) {
  switch (side) {
    case Side::inside:
      return "yes";
    case Side::outside:
      return "no";
    case Side::undecided:
      break;
  }
  return "undecided";
}

Expected<FrontierAnswer> map_of(const Frontier& frontier, const FrontierOptions& options, FrontierAnswer answer) {
  const auto count = static_cast<std::size_t>(options.points * options.points);
  std::vector<reports::FrontierReport::MapPoint> map(count);
  std::vector<Faults> faults(count);
  for_each_index(count, options.threads, [&](std::size_t index) {
    const auto i = static_cast<long>(index) / options.points, j = static_cast<long>(index) % options.points;
    const Rational x = map_value(options.axes[0], i, options.points), y = map_value(options.axes[1], j, options.points);
    const auto here = frontier.at({{options.axes[0].key, x}, {options.axes[1].key, y}});
    if (!here) {
      faults[index] = here.faults();
      return;
    }
    map[index].parameters = {{options.axes[0].key, model::exact_text(x)}, {options.axes[1].key, model::exact_text(y)}};
    map[index].within = within_text(here->side);
    if (here->error) {
      map[index].relative_error = reference::decimal(*here->error, error_digits, reference::Direction::nearest);
    }
  });
  for (const Faults& fault : faults) {
    if (!fault.empty()) return fault;
  }
  answer.report.map = std::move(map);
  return answer;
}

Faults option_faults(const model::Scenario& scenario, const FrontierOptions& options) {
  Faults faults;
  if (options.axes.empty() || options.axes.size() > 2) {
    faults.push_back(
        {{"--over", 0, 0, ""}, std::to_string(options.axes.size()) + " keys", "one key, or two for a map"});
  }
  for (const FrontierAxis& axis : options.axes) {
    if (!(axis.from < axis.to)) {
      faults.push_back({{"--from", 0, 0, axis.key}, "the range is empty", "--from below --to"});
    }
  }
  if (options.error <= 0) faults.push_back({{"--error", 0, 0, ""}, "it is not above 0", "a relative error above 0"});
  if (!scenario.sweeps.empty()) {
    faults.push_back({scenario.sweeps.front().location, "the scenario is swept", "no sweep; --over gives the range"});
  }
  return faults;
}

}  // namespace

Expected<FrontierAnswer> frontier_command(const model::Scenario& scenario, const FrontierOptions& options) {
  const auto chosen = chosen_shortcuts({options.shortcut});
  if (!chosen) return chosen.faults();
  const Faults faults = option_faults(scenario, options);
  if (!faults.empty()) return faults;
  const Chosen& one = chosen->front();
  if (!one.departure->enclose && !one.departure->value_is_the_machine_number) {
    return Fault{{"--shortcut", 0, 0, options.shortcut}, "its error cannot be certified", "another shortcut"};
  }
  FrontierAnswer answer;
  answer.report.title = scenario.title;
  answer.report.shortcut = one.departure->id;
  answer.report.setting = setting_text(one.setting);
  answer.report.quantity = model::name_of(options.quantity);
  answer.report.error = model::exact_text(options.error);
  for (const FrontierAxis& axis : options.axes) answer.report.over.push_back(axis.key);
  const Frontier frontier(scenario, one, options);
  return options.axes.size() == 1 ? bracket(frontier, options, std::move(answer))
                                  : map_of(frontier, options, std::move(answer));
}

}  // namespace heraldgauge::compare
