#include "tests/fast/campaign.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <ctime>
#include <iostream>

#include "tests/support/random_chain.hpp"

namespace heraldgauge::test {
namespace {

double cpu_seconds() { return static_cast<double>(std::clock()) / CLOCKS_PER_SEC; }

std::string family(const model::Quantity& quantity) {
  return quantity.kind == model::QuantityKind::end_pattern ? "end_pattern" : model::name_of(quantity);
}

}  // namespace

void Campaign::add(const model::Chain& chain, const reference::Request& request) {
  SCOPED_TRACE(describe_chain(chain));
  ++chains_;
  const double start = cpu_seconds();
  const std::vector<fast::Value> values = fast::evaluate(chain, request.quantities, request.pattern);
  const double middle = cpu_seconds();
  const auto enclosed = reference::enclose(chain, request);
  fast_seconds_ += middle - start;
  reference_seconds_ += cpu_seconds() - middle;
  ASSERT_TRUE(enclosed) << model::describe(enclosed.faults().front());
  for (const Judgement& judgement : judge(chain, values, *enclosed)) check(judgement, chain);
}

void Campaign::check(const Judgement& judgement, const model::Chain& chain) {
  switch (judgement.kind) {
    case Judgement::Kind::compared:
      return compare(judgement, chain);
    case Judgement::Kind::both_undefined:
      ++undefined_;
      return;
    case Judgement::Kind::undecided:
      ++undecided_;
      return;
    case Judgement::Kind::declined:
      ++declined_;
      ++reasons_[family(judgement.quantity) + ": " + judgement.text];
      return;
    case Judgement::Kind::contradicted:
      ADD_FAILURE() << model::name_of(judgement.quantity) << " is undefined on one side only: " << judgement.text;
  }
}

void Campaign::compare(const Judgement& judgement, const model::Chain& chain) {
  ++compared_;
  const std::string what = model::name_of(judgement.quantity) + " " + judgement.value;
  EXPECT_LE(judgement.error, judgement.bound) << "its own bound is violated: " << what;
  EXPECT_LE(judgement.error, largest_error_) << what << ", bound " << judgement.bound;
  EXPECT_FALSE(judgement.zero_missed) << what << " where the exact value is 0";
  if (judgement.bound > largest_error_) ++wide_bounds_;
  if (judgement.bound > 0) largest_share_ = std::max(largest_share_, judgement.error / judgement.bound);
  Worst& worst = worst_[family(judgement.quantity)];
  if (judgement.error > worst.error) {
    worst.error = judgement.error;
    worst.error_of = what + " of " + describe_chain(chain);
  }
  if (judgement.bound > worst.bound) {
    worst.bound = judgement.bound;
    worst.bound_of = what + " of " + describe_chain(chain);
  }
}

Campaign::~Campaign() {
  std::cout << name_ << ": " << chains_ << " chains, " << compared_ << " values compared, " << undefined_
            << " undefined by both, " << declined_ << " declined, " << undecided_ << " not certified by the reference; "
            << wide_bounds_ << " bounds above " << largest_error_ << "; largest share of a bound " << largest_share_
            << "; CPU seconds " << fast_seconds_ << " fast, " << reference_seconds_ << " reference\n";
  for (const auto& [quantity, worst] : worst_) {
    std::cout << "  " << quantity << ": largest error " << worst.error << ", largest bound " << worst.bound << "\n";
  }
  for (const auto& [reason, count] : reasons_) std::cout << "  declined " << count << " times, " << reason << "\n";
  print_worst();
}

void Campaign::print_worst() const {
  const auto by_error = [](const auto& a, const auto& b) { return a.second.error < b.second.error; };
  const auto by_bound = [](const auto& a, const auto& b) { return a.second.bound < b.second.bound; };
  const auto error = std::max_element(worst_.begin(), worst_.end(), by_error);
  if (error == worst_.end()) return;
  std::cout << "  largest error: " << error->second.error_of << "\n";
  const auto bound = std::max_element(worst_.begin(), worst_.end(), by_bound);
  std::cout << "  largest bound: " << bound->second.bound_of << "\n";
}

}  // namespace heraldgauge::test
