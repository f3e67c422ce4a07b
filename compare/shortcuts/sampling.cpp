// Answers by sampling, all from one fixed seed.

#include <algorithm>
#include <cmath>
#include <sstream>

#include "compare/other_chain.hpp"
#include "compare/quantities_binary64.hpp"
#include "compare/sampling/metropolis.hpp"
#include "compare/sampling/sample.hpp"

namespace heraldgauge::compare {
namespace {

using model::Quantity;
using model::QuantityKind;
using model::Rational;
using reference::Basis;
using reference::EndTable;

constexpr std::uint64_t seed = 20061;
constexpr std::uint64_t most_trials = 5'000'000;  // of a sample that stops at a standard error
constexpr std::size_t most_stations = 4;

bool is_sampled(const Quantity& quantity) {
  return touches_probabilities(quantity) && quantity.kind != QuantityKind::pattern_probability &&
         quantity.kind != QuantityKind::visibility && quantity.kind != QuantityKind::visibility_deficit;
}

std::optional<std::string> not_served(const model::Chain& chain) {
  const auto has_background = [](const auto& place) { return !place.background.photons.is_zero(); };
  const bool background = has_background(chain.left_end) || has_background(chain.right_end) ||
                          std::any_of(chain.stations.begin(), chain.stations.end(), has_background);
  if (background) return "a shared background is not sampled";
  if (chain.station_count() > most_stations) return "more than four stations";
  return std::nullopt;
}

std::vector<Basis> bases_of(const std::vector<Quantity>& quantities) {
  std::vector<Basis> bases;
  const auto want = [&](Basis basis) {
    if (std::find(bases.begin(), bases.end(), basis) == bases.end()) bases.push_back(basis);
  };
  for (const Quantity& quantity : quantities) {
    if (quantity.kind == QuantityKind::end_pattern) want(Basis::analyser);
    if (quantity.kind == QuantityKind::gain || quantity.kind == QuantityKind::qber_rectilinear ||
        touches_key(quantity)) {
      want(Basis::rectilinear);
    }
    if (quantity.kind == QuantityKind::qber_diagonal || touches_key(quantity)) want(Basis::diagonal);
  }
  return bases;
}

class CountedProbabilities : public Probabilities64 {
 public:
  explicit CountedProbabilities(const Counts& counts) : counts_(counts) {}
  double herald() override { return share(counts_.heralds); }
  std::optional<double> pattern(const model::Pattern&) override { return std::nullopt; }
  std::optional<Extremes> coincidence() override { return std::nullopt; }
  EndTable<double> ends(Basis basis) override {
    EndTable<double> table{};
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) table.joint[l][r] = share(counts_.ends.at(basis)[l][r]);
    }
    return table;
  }

 private:
  double share(std::uint64_t count) const { return static_cast<double>(count) / static_cast<double>(counts_.trials); }
  const Counts& counts_;
};

std::string effort_of(const Counts& counts) {
  std::ostringstream text;
  text.imbue(std::locale::classic());
  text << counts.trials << " trials, " << counts.heralds << " heralded";
  if (counts.heralds > 0) {
    text.precision(2);
    text << ", relative standard error " << 1 / std::sqrt(static_cast<double>(counts.heralds));
  }
  return text.str();
}

std::vector<Value> by_sample(const Case& point, const std::vector<Quantity>& quantities, const Stop& stop) {
  if (const auto reason = not_served(point.chain)) return declined(quantities, *reason);
  TrialModel trials(point.chain);
  const Counts counts = sampled(trials, bases_of(quantities), stop, seed);
  CountedProbabilities probabilities(counts);
  std::vector<Value> values = quantities_of(probabilities, point, quantities);
  for (Value& value : values) value.effort = effort_of(counts);
  return values;
}

Departure sample(const std::string& id, const std::string& sentence, const std::string& claimed,
                 const SettingRange& range) {
  Departure departure;
  departure.id = id;
  departure.sentence = sentence;
  departure.replaces = "a probability by a relative frequency";
  departure.claimed = claimed;
  departure.source = "common practice";
  departure.setting = range;
  departure.touches = is_sampled;
  departure.value_is_the_machine_number = true;
  return departure;
}

}  // namespace

Departure shot_sampling() {
  Departure departure =
      sample("shot-sampling", "Trials are simulated and counted.", "many heralds among the trials",
             {"shots", "trials simulated", 1, Rational(1'000'000'000), true, 100000, {10000, 100000, 1000000}});
  departure.evaluate = [](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    return by_sample(point, quantities, {setting->get_num().get_ui(), 0});
  };
  return departure;
}

Departure shot_sampling_to_error() {
  Departure departure = sample("shot-sampling-to-error",
                               "Trials are simulated until the herald probability has the wanted standard error.",
                               "where that many heralds can be waited for (it gives up after 5 million trials)",
                               {"error",
                                "relative standard error at which to stop",
                                Rational(1, 1000),
                                1,
                                false,
                                Rational(1, 100),
                                {Rational(1, 10), Rational(1, 100)}});
  departure.evaluate = [](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    return by_sample(point, quantities, {most_trials, heralds_for(setting->get_d())});
  };
  return departure;
}

Departure metropolis_pair_numbers() {
  Departure departure =
      sample("metropolis-pair-numbers",
             "Conditional quantities are averaged over a Metropolis-Hastings walk through the hidden pair numbers.",
             "walks much longer than their correlation time",
             {"steps", "steps of the walk", 1, 100'000'000, true, 20000, {2000, 20000, 200000}});
  departure.replaces = "the average over pair numbers given the herald by that over a walk";
  departure.touches = [](const Quantity& quantity) {
    return is_sampled(quantity) && quantity.kind != QuantityKind::herald_probability &&
           quantity.kind != QuantityKind::trials_per_herald && quantity.kind != QuantityKind::key_rate;
  };
  const auto touches = departure.touches;
  departure.evaluate = [touches](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    if (const auto reason = not_served(point.chain)) return declined(quantities, *reason);
    TrialModel trials(point.chain);
    const auto walk = metropolis_walk(trials, point.chain, bases_of(quantities), setting->get_num().get_ui(), seed);
    if (!walk) return declined(quantities, "no pair numbers were found from which a herald can come");
    WalkProbabilities probabilities(*walk);
    std::vector<Value> values = quantities_of(probabilities, point, quantities);
    for (Value& value : values) {
      if (!touches(value.quantity))
        value = declined({value.quantity}, "a walk given the herald cannot tell it").front();
      value.effort = std::to_string(walk->steps) + " steps, " + std::to_string(walk->accepted) + " accepted";
    }
    return values;
  };
  return departure;
}

}  // namespace heraldgauge::compare
