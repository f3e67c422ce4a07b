#pragma once
// The summary of an audit, gathered number by number in little memory.

#include <array>
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "compare/audit/verdict.hpp"
#include "compare/digits.hpp"
#include "reports/record/audit.hpp"

namespace heraldgauge::compare {

// The values that one parameter took: numbers as a range, words as a set.
class Extent {
 public:
  void add(const model::Value& value, const std::string& text);
  bool empty() const { return text_from_.empty(); }
  std::string from() const;
  std::string to() const { return text_to_; }
  // No value in common, ranges not overlapping.
  bool apart_from(const Extent& other) const;

 private:
  bool is_number_ = false;
  double lowest_ = 0, highest_ = 0;
  std::string text_from_, text_to_;
  std::set<std::string> words_;
};

class SummaryGatherer {
 public:
  SummaryGatherer(const std::vector<model::Quantity>& quantities, const std::vector<std::string>& keys);

  std::size_t add_row() { return ++rows_; }  // its number, from 1
  void add(std::size_t quantity, const JudgedNumber& judged, const KnownPoint& point, std::size_t line);
  reports::AuditSummary summary() const;

 private:
  struct Gathered {
    reports::VerdictCounts counts;
    std::array<std::size_t, most_digits + 1> digits{};
    std::optional<std::size_t> worst_line;
    long worst_digits = most_digits + 1;
    std::vector<Extent> wrong, right;  // one a parameter
  };

  reports::QuantitySummary summary_of(std::size_t quantity) const;
  std::vector<reports::DisagreementRange> where(const Gathered& gathered) const;
  std::vector<std::string> remarks() const;

  std::vector<model::Quantity> quantities_;
  std::vector<std::string> keys_;
  std::size_t rows_ = 0;
  std::vector<Gathered> gathered_;
  std::vector<Extent> all_;
  std::size_t above_chain_ = 0, above_point_ = 0, without_digits_ = 0;
};

}  // namespace heraldgauge::compare
