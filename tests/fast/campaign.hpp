#pragma once
// What many chains together say about the fast evaluator: how often it answered, how far off it was, where it was
// worst.

#include <map>
#include <string>
#include <vector>

#include "tests/fast/judge.hpp"

namespace heraldgauge::test {

class Campaign {
 public:
  // largest_error: what every value must be within, relative.
  Campaign(std::string name, double largest_error) : name_(std::move(name)), largest_error_(largest_error) {}
  ~Campaign();  // prints the summary

  Campaign(const Campaign&) = delete;
  Campaign& operator=(const Campaign&) = delete;

  // Evaluates and encloses one chain, records a test failure for each value whose own bound is violated, that is
  // further off than largest_error, that is not zero where the exact value is, or that is undefined on one side only.
  void add(const model::Chain& chain, const reference::Request& request);

  int compared() const { return compared_; }
  int declined() const { return declined_; }
  int wide_bounds() const { return wide_bounds_; }  // values whose own bound is above largest_error

 private:
  // The largest error and the largest bound of one quantity, each with its value and chain.
  struct Worst {
    double error = 0;
    double bound = 0;
    std::string error_of;
    std::string bound_of;
  };
  void check(const Judgement& judgement, const model::Chain& chain);
  void compare(const Judgement& judgement, const model::Chain& chain);
  void print_worst() const;

  std::string name_;
  double largest_error_;
  int chains_ = 0;
  int compared_ = 0;
  int undefined_ = 0;
  int undecided_ = 0;
  int declined_ = 0;
  int wide_bounds_ = 0;
  double largest_share_ = 0;            // of its own bound that an error took
  std::map<std::string, Worst> worst_;  // by quantity, the 16 end patterns together
  std::map<std::string, int> reasons_;  // of declined values
  double fast_seconds_ = 0;
  double reference_seconds_ = 0;
};

}  // namespace heraldgauge::test
