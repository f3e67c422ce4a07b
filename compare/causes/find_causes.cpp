#include "compare/causes/find_causes.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "compare/causes/departures.hpp"
#include "compare/causes/evaluate.hpp"
#include "compare/causes/noise.hpp"
#include "compare/causes/patterns.hpp"

namespace heraldgauge::compare {
namespace {

constexpr std::size_t most_causes = 6;

void append(std::vector<Hypothesis>& all, std::vector<Hypothesis> more) {
  for (Hypothesis& one : more) all.push_back(std::move(one));
}

bool explains_all_alone(const Data& data, const std::vector<Hypothesis>& hypotheses) {
  return std::any_of(hypotheses.begin(), hypotheses.end(),
                     [&](const Hypothesis& one) { return explains_everything(data, one.score); });
}

// What takes many evaluations is tried only where no registered cause explains all alone.
std::vector<Hypothesis> all_hypotheses(const Data& data, unsigned threads) {
  std::vector<Hypothesis> all = single_departures(data, threads);
  const bool settled = explains_all_alone(data, all);
  append(all, constant_patterns(data));
  append(all, shifted_rows(data));
  append(all, shot_sampling(data));
  append(all, round_off_pattern(data));
  if (!settled) append(all, axis_patterns(data, threads));
  if (!settled) append(all, departure_pairs(data, threads));
  std::erase_if(all, [&](const Hypothesis& one) { return !is_plausible(data, one.score); });
  return all;
}

// The share of the table that speaks for an explanation. One that predicts no number of its own fits by construction,
// so that one that does and explains nearly all goes before it.
double worth(const Hypothesis& one) {
  constexpr double of_what_fits_by_construction = 0.95;
  const auto explained = static_cast<double>(one.score.explained);
  return one.from_the_table ? of_what_fits_by_construction * explained : explained;
}

// Explanations of equal worth keep the order of the registries. Those that explain everything are of equal worth: what
// is left of their residuals is the rounding of the table.
bool comes_before(const Data& data, const Hypothesis& a, const Hypothesis& b) {
  if (worth(a) != worth(b)) return worth(a) > worth(b);
  if (a.complexity != b.complexity) return a.complexity < b.complexity;
  return !explains_everything(data, a.score) && a.score.residual < b.score.residual;
}

// A number that the model gives in binary64 just so speaks for no cause, though it differs: it is a small rest of
// larger ones, as a key rate is where it vanishes.
void set_rounding_aside(Data& data) {
  for (Target& target : data.targets) {
    if (!target.wrong) continue;
    const Value value = values_of_model(data.cases[target.point], {data.quantities[target.quantity]}).front();
    if (value.status != fast::Status::computed || distance(target, in_unit_of(target, value.value)) > 1) continue;
    target.wrong = false;
    --data.wrong_count;
  }
}

std::vector<bool> explained_set(const Data& data, const Hypothesis& hypothesis) {
  std::vector<bool> set;
  for (std::size_t i = 0; i < data.targets.size(); ++i) {
    set.push_back(hypothesis.prediction[i] && distance(data.targets[i], *hypothesis.prediction[i]) <= 1);
  }
  return set;
}

std::string name_of_parts(const Hypothesis& hypothesis) {
  std::string name;
  for (const HypothesisPart& part : hypothesis.parts) name += (name.empty() ? "" : " + ") + part.id;
  return name;
}

bool has_part(const Hypothesis& hypothesis, const std::string& id) {
  return std::any_of(hypothesis.parts.begin(), hypothesis.parts.end(),
                     [&](const HypothesisPart& part) { return part.id == id; });
}

// Whether `other` is `leader` with something added: that explains nothing more.
bool only_adds_to(const Hypothesis& other, const Hypothesis& leader) {
  return leader.parts.size() == 1 && other.parts.size() > 1 && has_part(other, leader.parts[0].id);
}

// Hypotheses that explain the same numbers, the preferred one first.
using Group = std::vector<const Hypothesis*>;

std::vector<Group> groups_of(const Data& data, const std::vector<Hypothesis>& sorted) {
  std::vector<Group> groups;
  std::vector<std::vector<bool>> sets;
  for (const Hypothesis& one : sorted) {
    const std::vector<bool> set = explained_set(data, one);
    const auto place = std::find(sets.begin(), sets.end(), set);
    if (place == sets.end()) {
      sets.push_back(set);
      groups.push_back({&one});
      continue;
    }
    Group& group = groups[static_cast<std::size_t>(place - sets.begin())];
    if (std::none_of(group.begin(), group.end(),
                     [&](const Hypothesis* earlier) { return only_adds_to(one, *earlier); })) {
      group.push_back(&one);
    }
  }
  return groups;
}

reports::Cause cause_of(const Data& data, const Group& group, const HypothesisPart& part) {
  const Hypothesis& leader = *group.front();
  reports::Cause cause;
  cause.cause = part.id;
  cause.kind = part.kind;
  cause.setting = part.setting;
  cause.sentence = part.sentence;
  cause.explains =
      fmt::format("{:.3g}", static_cast<double>(leader.score.explained) / static_cast<double>(data.targets.size()));
  cause.residual = fmt::format("{:.3g}", leader.score.residual);
  for (const HypothesisPart& other : leader.parts) {
    if (&other != &part) cause.together_with.push_back(other.id);
  }
  for (std::size_t i = 1; i < group.size(); ++i) cause.same_as.push_back(name_of_parts(*group[i]));
  return cause;
}

}  // namespace

CausesFound find_causes(const Sample& sample, const Subject& subject, unsigned threads) {
  if (!sample.any_wrong()) return {};
  Data data = data_of(sample.data(), subject);
  set_rounding_aside(data);
  if (data.wrong_count == 0) {
    return {{}, "The numbers that differ are those that the model gives in binary64: a small rest of larger ones."};
  }
  std::vector<Hypothesis> hypotheses = all_hypotheses(data, threads);
  std::stable_sort(hypotheses.begin(), hypotheses.end(),
                   [&](const Hypothesis& a, const Hypothesis& b) { return comes_before(data, a, b); });
  CausesFound found;
  for (const Group& group : groups_of(data, hypotheses)) {
    if (found.causes.size() >= most_causes) break;
    for (const HypothesisPart& part : group.front()->parts) found.causes.push_back(cause_of(data, group, part));
  }
  if (found.causes.empty()) {
    found.note =
        "Nothing fits: no registered shortcut or convention, no pair of them and none of the patterns gives these "
        "numbers.";
  }
  return found;
}

}  // namespace heraldgauge::compare
