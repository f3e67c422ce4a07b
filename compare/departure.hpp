#pragma once
// A departure from the model: a shortcut (an approximation taken on purpose) or a convention (a number meant in another
// way than it is used). One mechanism for both: what it says, where it is claimed to hold, and what it gives in place
// of the exact values.

#include <functional>
#include <memory>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "fast/evaluate.hpp"
#include "reference/enclose.hpp"
#include "reference/model/scenario.hpp"

namespace heraldgauge::compare {

namespace fock {
struct Recipe;
}

// One point: the settings in force and the chain that they resolve to.
struct Case {
  const model::Scenario* scenario = nullptr;  // outlives the case; none where the chain was built by hand
  std::vector<std::pair<std::string, model::Value>> changes;  // swept keys at the point, or a table row
  model::Chain chain;
  std::optional<model::Pattern> pattern;
};

// The case at a point of the sweeps, and the one that results from given changes of the settings.
model::Expected<Case> case_at(const model::Scenario& scenario, std::uint64_t index);
model::Expected<Case> case_with(const model::Scenario& scenario,
                                const std::vector<std::pair<std::string, model::Value>>& changes);
// The number in force for a key at a case, a changed one before the scenario's own; nothing where the key is not set to
// a number or the case has no scenario. The same case with that number changed; requires a scenario.
std::optional<model::Rational> number_in_force(const Case& point, const std::string& key);
model::Expected<Case> case_with(const Case& point, const std::string& key, const model::Rational& number);

// A number that a departure is used with, such as the pairs kept.
using Setting = std::optional<model::Rational>;
struct SettingRange {
  std::string name;
  std::string sentence;
  model::Rational smallest, largest;
  bool integer = true;
  model::Rational standard;                 // where none is stated
  std::vector<model::Rational> candidates;  // tried when a setting is sought
};

// What a departure gives for one quantity.
struct Value {
  model::Quantity quantity;
  fast::Status status = fast::Status::declined;
  std::string reason;
  fast::Scaled value;
  std::string effort{};  // of a sample: what it took and how far it got; else empty
};

// The same as a certified enclosure of what its formula gives.
struct CertifiedValue {
  model::Quantity quantity;
  fast::Status status = fast::Status::declined;
  std::string reason;
  std::optional<reference::Enclosure> enclosure;  // present exactly where computed
};

// An evaluator of cases, in binary64 and with certificates.
using Evaluator = std::function<std::vector<Value>(const Case&, const std::vector<model::Quantity>&)>;
using CertifiedEvaluator =
    std::function<std::vector<CertifiedValue>(const Case&, const std::vector<model::Quantity>&, int digits)>;

enum class DepartureKind { shortcut, convention };

struct Departure {
  std::string id;
  DepartureKind kind = DepartureKind::shortcut;
  std::string sentence;
  std::string replaces;  // the formula it stands in for
  std::string claimed;   // where it is claimed valid
  std::string source;    // by whom; "common practice" where nobody in particular
  std::optional<SettingRange> setting;
  std::function<bool(const model::Quantity&)> touches;  // which quantities it may change

  // In binary64. One value a quantity, in the order asked; declined where it does not apply to the case.
  std::function<std::vector<Value>(const Case&, const std::vector<model::Quantity>&, const Setting&)> evaluate;

  // Where its formula is exact in itself: enclosures of relative width about 10^-digits. Absent where the departure is
  // a way of computing (a machine arithmetic, a sample), whose value is the number it returns.
  std::function<std::vector<CertifiedValue>(const Case&, const std::vector<model::Quantity>&, const Setting&,
                                            int digits)>
      enclose;
  bool value_is_the_machine_number = false;  // evaluate() is the definition, so its error is certified as it stands

  // Where it is a sample: the trials that a setting stands for at a case with this herald probability.
  std::function<double(const Setting&, double herald_probability)> trials;

  // Where it only changes the inputs: the case whose exact values it gives.
  std::function<model::Expected<Case>(const Case&)> transform;

  // Where the explicit Fock evaluator serves it: how (fock/departure.hpp).
  std::shared_ptr<const fock::Recipe> recipe;

  // Where it only works on values: its values from those of another evaluator, so that it can be laid over a departure.
  std::function<std::vector<Value>(const Case&, const std::vector<model::Quantity>&, const Evaluator& inner)> rework;
  std::function<std::vector<CertifiedValue>(const Case&, const std::vector<model::Quantity>&,
                                            const CertifiedEvaluator& inner, int digits)>
      certified_rework;
};

// The setting to use: the one given where it is allowed, the standard one where none is given, a fault else.
model::Expected<Setting> checked_setting(const Departure& departure, const Setting& given);

// Whether a quantity is touched, for departures that touch everything that depends on probabilities, or one group.
bool touches_probabilities(const model::Quantity& quantity);  // all but the capacities
bool touches_capacities(const model::Quantity& quantity);
bool touches_everything(const model::Quantity& quantity);
bool touches_key(const model::Quantity& quantity);         // key_fraction and key_rate
bool touches_errors(const model::Quantity& quantity);      // the error rates, and with them the key
bool touches_analyser(const model::Quantity& quantity);    // what depends on the chain's own analyser angles
bool touches_visibility(const model::Quantity& quantity);  // visibility and visibility_deficit

}  // namespace heraldgauge::compare
