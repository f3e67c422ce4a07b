#pragma once
// Departures that are a formula over quantities of the case, or of cases derived from it. The formula is written once,
// in intervals; in binary64 it is given the binary64 values as points and its result is rounded.

#include "compare/departure.hpp"
#include "reference/arithmetic/interval.hpp"

namespace heraldgauge::compare {

// A number, or the reason why there is none.
struct Term {
  fast::Status status = fast::Status::declined;
  std::string reason;
  std::optional<reference::Interval> value;  // present exactly where computed
};
Term computed(const reference::Interval& value);
Term declined_term(const std::string& reason);

// Values of quantities, of any case, from one evaluator; each is asked for once.
class Terms {
 public:
  virtual ~Terms() = default;
  Term at(const Case& point, const model::Quantity& quantity);
  // Asks for several at once, which costs less than one by one.
  void prepare(const Case& point, const std::vector<model::Quantity>& quantities);
  reference::Precision bits() const { return bits_; }

 protected:
  explicit Terms(reference::Precision bits) : bits_(bits) {}
  virtual std::vector<Term> ask(const Case& point, const std::vector<model::Quantity>& quantities) = 0;

 private:
  struct Known {
    Case point;
    std::vector<std::pair<model::Quantity, Term>> terms;
  };
  Known& known(const Case& point);

  reference::Precision bits_;
  std::vector<Known> known_;
};

// What a departure gives for one quantity.
using Formula = std::function<Term(const Case&, const model::Quantity&, Terms&)>;

// Completes a departure with evaluate, enclose and the reworking forms.
Departure by_formula(Departure departure, const Formula& formula);

// Completes a departure whose values in binary64 are those of its enclosures, rounded: for formulas that are cheap to
// certify.
Departure rounding_its_enclosures(Departure departure);

// The first of several terms that is no number, or nothing.
std::optional<Term> first_missing(std::initializer_list<const Term*> terms);

// A number as binary64 with an exponent of any size, and back without any rounding.
fast::Scaled scaled(const model::Rational& x);
model::Rational exactly(const fast::Scaled& value);

}  // namespace heraldgauge::compare
