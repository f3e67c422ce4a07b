#include "compare/causes/departures.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <span>

#include "compare/causes/evaluate.hpp"
#include "compare/causes/noise.hpp"
#include "compare/parallel.hpp"
#include "compare/registry.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;

// Targets on which an explanation must prove itself before it is tried on all.
constexpr std::size_t screening_targets = 6;

// A departure used with one setting.
struct Used {
  const Departure* departure;
  Setting setting;
};

using Evaluate = std::function<std::vector<Value>(const Case&, const std::vector<Quantity>&)>;

std::vector<Used> used_departures(const Data& data) {
  std::vector<Used> used;
  for (const std::vector<Departure>* registry : {&shortcuts(), &conventions()}) {
    for (const Departure& departure : *registry) {
      if (std::none_of(data.quantities.begin(), data.quantities.end(), departure.touches)) continue;
      if (!departure.setting) used.push_back({&departure, std::nullopt});
      if (!departure.setting) continue;
      for (const model::Rational& setting : departure.setting->candidates) used.push_back({&departure, setting});
    }
  }
  return used;
}

// Indices of the targets, those at the same point together.
std::vector<std::vector<std::size_t>> by_point(const Data& data, std::span<const std::size_t> targets) {
  std::vector<std::vector<std::size_t>> groups(data.cases.size());
  for (const std::size_t i : targets) groups[data.targets[i].point].push_back(i);
  std::erase_if(groups, [](const std::vector<std::size_t>& group) { return group.empty(); });
  return groups;
}

void predict_at_point(const Data& data, const std::vector<std::size_t>& group, const Evaluate& evaluate,
                      Prediction& prediction) {
  std::vector<Quantity> quantities;
  for (const std::size_t i : group) {
    const Quantity& quantity = data.quantities[data.targets[i].quantity];
    if (std::find(quantities.begin(), quantities.end(), quantity) == quantities.end()) quantities.push_back(quantity);
  }
  const std::vector<Value> values = evaluate(data.cases[data.targets[group.front()].point], quantities);
  for (const std::size_t i : group) {
    const auto place = std::find(quantities.begin(), quantities.end(), data.quantities[data.targets[i].quantity]);
    const Value& value = values[static_cast<std::size_t>(place - quantities.begin())];
    if (value.status == fast::Status::computed) prediction[i] = in_unit_of(data.targets[i], value.value);
  }
}

Prediction predict(const Data& data, std::span<const std::size_t> targets, const Evaluate& evaluate) {
  Prediction prediction(data.targets.size());
  for (const auto& group : by_point(data, targets)) predict_at_point(data, group, evaluate, prediction);
  return prediction;
}

std::vector<std::size_t> all_targets(const Data& data) {
  std::vector<std::size_t> targets(data.targets.size());
  for (std::size_t i = 0; i < targets.size(); ++i) targets[i] = i;
  return targets;
}

HypothesisPart part_of(const Used& used) {
  const Departure& departure = *used.departure;
  std::optional<std::string> setting;
  if (used.setting) setting = departure.setting->name + " = " + model::exact_text(*used.setting);
  return {departure.id, departure.kind == DepartureKind::shortcut ? "shortcut" : "convention", setting,
          departure.sentence};
}

int complexity_of(const Used& used) { return complexity_of_departure + (used.setting ? complexity_of_setting : 0); }

Evaluate evaluator_of(const Used& used) {
  return [used](const Case& point, const std::vector<Quantity>& quantities) {
    return values_of_departure(*used.departure, used.setting, point, quantities);
  };
}

// `outer` changes the inputs that `inner` works on, or works on its outputs; nothing where it does neither.
std::optional<Evaluate> composed(const Used& outer, const Used& inner) {
  const Evaluate evaluate = evaluator_of(inner);
  if (outer.departure->transform) {
    return [outer, evaluate](const Case& point, const std::vector<Quantity>& quantities) {
      const auto changed = outer.departure->transform(point);
      return changed ? evaluate(*changed, quantities) : std::vector<Value>(quantities.size(), Value{});
    };
  }
  if (!outer.departure->rework) return std::nullopt;
  return [outer, evaluate](const Case& point, const std::vector<Quantity>& quantities) {
    return outer.departure->rework(point, quantities, evaluate);
  };
}

bool better(const Score& a, const Score& b) {
  if (a.explained != b.explained) return a.explained > b.explained;
  return a.residual < b.residual;
}

// The wrong targets most unlike each other in how far off they are: the farthest first.
std::vector<std::size_t> screening(const Data& data) {
  std::vector<std::size_t> wrong;
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    if (data.targets[i].wrong) wrong.push_back(i);
  }
  std::sort(wrong.begin(), wrong.end(), [&](std::size_t a, std::size_t b) {
    return distance(data.targets[a], data.targets[a].exact) > distance(data.targets[b], data.targets[b].exact);
  });
  const std::size_t count = std::min(screening_targets, wrong.size());
  std::vector<std::size_t> chosen;
  for (std::size_t i = 0; i < count; ++i)
    chosen.push_back(wrong[count == 1 ? 0 : i * (wrong.size() - 1) / (count - 1)]);
  return chosen;
}

// Whether at most `misses` of the targets are missed; stops at the first one too many.
bool survives(const Data& data, const std::vector<std::size_t>& targets, std::size_t misses, const Evaluate& evaluate) {
  for (const std::size_t i : targets) {
    const Prediction prediction = predict(data, std::span(&i, 1), evaluate);
    const bool missed = !prediction[i] || distance(data.targets[i], *prediction[i]) > 1;
    if (missed && misses-- == 0) return false;
  }
  return true;
}

// Keeps one hypothesis a departure (or pair of departures): the one whose setting explains most.
void keep_best_settings(std::vector<Hypothesis>& hypotheses) {
  const auto same_ids = [](const Hypothesis& a, const Hypothesis& b) {
    return std::equal(a.parts.begin(), a.parts.end(), b.parts.begin(), b.parts.end(),
                      [](const HypothesisPart& x, const HypothesisPart& y) { return x.id == y.id; });
  };
  std::vector<Hypothesis> kept;
  for (Hypothesis& one : hypotheses) {
    const auto rival =
        std::find_if(kept.begin(), kept.end(), [&](const Hypothesis& other) { return same_ids(one, other); });
    if (rival == kept.end()) {
      kept.push_back(std::move(one));
    } else if (better(one.score, rival->score)) {
      *rival = std::move(one);
    }
  }
  hypotheses = std::move(kept);
}

// Whether a sample of that size may be as far off as the numbers are. The same sample over again costs many trials, so
// what is far too large or far too small is told first, from the standard error.
class SampleSizes {
 public:
  explicit SampleSizes(const Data& data) : data_(data), deviations_(deviations_of_a_trial(data)) {
    for (const Case& point : data.cases) {
      const Value herald = values_of_model(point, {{model::QuantityKind::herald_probability}}).front();
      heralds_.push_back(fast::to_binary64(herald.value));
    }
  }
  bool suit(const Used& used, const std::vector<std::size_t>& targets) const {
    double farthest = 0;
    for (const std::size_t i : targets) {
      if (!deviations_[i]) continue;
      const double trials = used.departure->trials(used.setting, heralds_[data_.targets[i].point]);
      farthest = std::max(farthest, std::abs(*deviations_[i]) * std::sqrt(trials));
    }
    return farthest > least_deviation && farthest < most_deviation;
  }

 private:
  // In standard errors, of the numbers that are farthest off: a walk with its memory scatters more than free trials.
  static constexpr double least_deviation = 0.01, most_deviation = 30;
  const Data& data_;
  std::vector<std::optional<double>> deviations_;
  std::vector<double> heralds_;
};

struct Pair {
  Used outer, inner;
};

// No sample under another departure is sought: it would take the luck of one seed to find it.
std::vector<Pair> pairs_of(const std::vector<Used>& used) {
  std::vector<Pair> pairs;
  for (const Used& outer : used) {
    for (const Used& inner : used) {
      if (inner.departure->trials || outer.departure == inner.departure || !composed(outer, inner)) continue;
      pairs.push_back({outer, inner});
    }
  }
  return pairs;
}

}  // namespace

std::vector<Hypothesis> single_departures(const Data& data, unsigned threads) {
  const std::vector<Used> used = used_departures(data);
  const std::vector<std::size_t> targets = all_targets(data);
  const std::vector<std::size_t> first = screening(data);
  const SampleSizes sizes(data);
  std::vector<Hypothesis> hypotheses(used.size());
  for_each_index(used.size(), threads, [&](std::size_t i) {
    const bool sampled = static_cast<bool>(used[i].departure->trials);
    if (sampled && !sizes.suit(used[i], first)) return;
    if (!survives(data, first, sampled ? 0 : first.size() / 2, evaluator_of(used[i]))) return;
    Hypothesis& one = hypotheses[i];
    one.parts = {part_of(used[i])};
    one.complexity = complexity_of(used[i]);
    one.prediction = predict(data, targets, evaluator_of(used[i]));
    one.score = score(data, one.prediction);
  });
  std::erase_if(hypotheses, [](const Hypothesis& one) { return one.parts.empty(); });
  keep_best_settings(hypotheses);
  return hypotheses;
}

std::vector<Hypothesis> departure_pairs(const Data& data, unsigned threads) {
  const std::vector<Pair> pairs = pairs_of(used_departures(data));
  const std::vector<std::size_t> targets = all_targets(data);
  const std::vector<std::size_t> first = screening(data);
  std::vector<Hypothesis> hypotheses(pairs.size());
  for_each_index(pairs.size(), threads, [&](std::size_t i) {
    const Evaluate evaluate = *composed(pairs[i].outer, pairs[i].inner);
    if (!survives(data, first, 0, evaluate)) return;
    Hypothesis& one = hypotheses[i];
    one.parts = {part_of(pairs[i].outer), part_of(pairs[i].inner)};
    one.complexity = complexity_of(pairs[i].outer) + complexity_of(pairs[i].inner) + complexity_of_pattern;
    one.prediction = predict(data, targets, evaluate);
    one.score = score(data, one.prediction);
  });
  std::erase_if(hypotheses, [](const Hypothesis& one) { return one.parts.empty(); });
  for (Hypothesis& one : hypotheses) {
    if (one.parts[1].id < one.parts[0].id) std::swap(one.parts[0], one.parts[1]);
  }
  keep_best_settings(hypotheses);
  return hypotheses;
}

}  // namespace heraldgauge::compare
