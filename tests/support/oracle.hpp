#pragma once
// The brute-force rows of tests/published/oracle.json as chains and patterns. They were made by summing explicit
// truncated Fock matrices at 60 digits, without determinants or generating functions.

#include <string>
#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"

namespace heraldgauge::test {

struct OracleRow {
  // probability: P(numerator[0]). ratio: sum of P(numerator) over sum of P(denominator). visibility: (max - min)/(max +
  // min) over the right analyser angle of P(numerator[0]); the row's right angle is then without meaning.
  enum class Kind { probability, ratio, visibility };

  std::string id;
  std::string note;
  Kind kind = Kind::probability;
  model::Chain chain;
  std::vector<model::Pattern> numerator;
  std::vector<model::Pattern> denominator;  // empty where nothing is divided by; for a visibility, the herald
  // What the row's truncation certifies, before its printed value was rounded.
  model::Rational value;
  model::Rational bound;
  model::Rational half_last_digit;  // half a unit of the last printed digit of value
  int trusted_digits = 0;           // significant; value carries two more
  bool resolving = false;           // some detector counts photons

  // The interval in which the true number lies: for a probability the truncation only drops non-negative terms, so
  // [value, value + bound]; else value +- bound. Widened by half a unit of the last printed digit.
  model::Rational lower() const;
  model::Rational upper() const;
};

// All 42 rows in the file's order: 38 with threshold detectors only, 4 resolving. An end that a row does not measure
// has both its detectors not looked at. A station's herald is psi- where the row's first pattern is a psi- outcome,
// else psi+. Throws where the file does not have the expected form.
std::vector<OracleRow> oracle_rows();

}  // namespace heraldgauge::test
