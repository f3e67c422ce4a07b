#include "compare/fock/departure.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "compare/chain_edits.hpp"
#include "compare/fock/extremes.hpp"
#include "compare/fock/route.hpp"
#include "compare/other_chain.hpp"
#include "compare/quantities_binary64.hpp"

namespace heraldgauge::compare::fock {
namespace {

using model::Quantity;
using reference::Basis;
using reference::EndTable;

constexpr long most_pairs = 60;
constexpr double binary64_bits = 44;  // what is left out in binary64, relative to the herald

template <class Number>
double in_double(const Number& x) {
  return static_cast<double>(x);
}

template <class Number>
class FockProbabilities : public Probabilities64 {
 public:
  explicit FockProbabilities(const Description& description)
      : description_(description), chain_(Arithmetic<Number>{}, description) {}

  double herald() override { return in_double(chain_.herald().front()); }
  std::optional<double> pattern(const model::Pattern& pattern) override {
    return in_double(chain_.pattern(pattern).front());
  }
  EndTable<double> ends(Basis basis) override {
    const EndTable<Number> table = chain_.ends(basis).front();
    EndTable<double> result{};
    for (std::size_t l = 0; l < 4; ++l) {
      for (std::size_t r = 0; r < 4; ++r) result.joint[l][r] = in_double(table.joint[l][r]);
    }
    return result;
  }
  std::optional<Extremes> coincidence() override {
    const long points = 2 * chain_.cut(description_.chain.station_count()) + 1;
    std::vector<Rational> angles;
    for (long j = 0; j < points; ++j) angles.push_back(Rational(180 * j) / points);
    const ExtremeAngles at = extreme_angles(harmonics_of(at_angles(angles)));
    const double degrees_per_phi = 90 / std::numbers::pi;  // phi = 2 th
    const auto values = at_angles({Rational(at.smallest * degrees_per_phi), Rational(at.largest * degrees_per_phi)});
    return Extremes{values[0], values[1]};
  }

 private:
  std::vector<double> at_angles(const std::vector<Rational>& degrees) const {
    std::vector<double> values;
    for (const auto& by_total : chain_.coincidences(degrees)) values.push_back(in_double(by_total.front()));
    return values;
  }

  Description description_;
  Chain<Number> chain_;
};

std::optional<std::string> not_served(const model::Chain& chain, const std::vector<long>& cuts) {
  if (has_background(chain)) return "a shared background is not served";
  if (*std::max_element(cuts.begin(), cuts.end()) > most_pairs) return "too many pairs would have to be kept";
  return std::nullopt;
}

// Pairs to keep in binary64: what is left out is small against the herald.
std::vector<long> cuts_in_binary64(const Recipe& recipe, const Case& point, const Setting& setting) {
  std::vector<long> cuts = recipe.cuts(point.chain, setting, -binary64_bits);
  if (!recipe.tail || not_served(point.chain, cuts)) return cuts;
  const double herald =
      Chain<double>(Arithmetic<double>{}, described(recipe, point.chain, setting, cuts)).herald().front();
  if (!(herald > 0)) return cuts;
  return recipe.cuts(point.chain, setting, std::log2(herald) - binary64_bits);
}

}  // namespace

template <class Number>
std::vector<Value> values_in(const Description& description, const Case& point,
                             const std::vector<Quantity>& quantities) {
  FockProbabilities<Number> probabilities(description);
  return quantities_of(probabilities, point, quantities);
}
template std::vector<Value> values_in<float>(const Description&, const Case&, const std::vector<Quantity>&);
template std::vector<Value> values_in<double>(const Description&, const Case&, const std::vector<Quantity>&);

Description described(const Recipe& recipe, const model::Chain& chain, const Setting& setting,
                      const std::vector<long>& cuts) {
  Description description = model_description(chain, cuts);
  recipe.change(description, setting);
  return description;
}

std::optional<Recipe> both(const Recipe& first, const Setting& first_setting, const Recipe& second,
                           const Setting& second_setting) {
  if (!first.tail && !second.tail) return std::nullopt;
  const Recipe& cutting = first.tail ? second : first;
  const Setting setting = first.tail ? second_setting : first_setting;
  Recipe recipe = cutting;
  recipe.cuts = [cutting, setting](const model::Chain& chain, const Setting&, double log2_tail) {
    return cutting.cuts(chain, setting, log2_tail);
  };
  recipe.change = [=](Description& description, const Setting&) {
    first.change(description, first_setting);
    second.change(description, second_setting);
  };
  return recipe;
}

Departure by_fock(Departure departure, const Recipe& recipe) {
  departure.recipe = std::make_shared<const Recipe>(recipe);
  departure.evaluate = [recipe](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting) {
    const auto cuts = cuts_in_binary64(recipe, point, setting);
    if (const auto reason = not_served(point.chain, cuts)) return declined(quantities, *reason);
    return values_in<double>(described(recipe, point.chain, setting, cuts), point, quantities);
  };
  departure.enclose = [recipe](const Case& point, const std::vector<Quantity>& quantities, const Setting& setting,
                               int digits) {
    const auto cuts = cuts_in_binary64(recipe, point, setting);
    if (const auto reason = not_served(point.chain, cuts)) return declined_certified(quantities, *reason);
    const auto make = [&] { return std::make_unique<FockRoute>(point.chain, setting, recipe); };
    return certified_by(make, point, quantities, digits);
  };
  return departure;
}

Departure by_changed_response(Departure departure, const std::function<void(Description&)>& change, Tail tail) {
  const auto cuts = [](const model::Chain& chain, const Setting&, double log2_tail) {
    return cuts_for_model(chain, log2_tail);
  };
  const auto changed = [change](Description& description, const Setting&) { change(description); };
  return by_fock(std::move(departure), {cuts, changed, tail});
}

}  // namespace heraldgauge::compare::fock
