#include "reference/pair_number/certified_tail.hpp"

#include "reference/pair_number/cutoffs.hpp"
#include "reference/pair_number/tail_bound.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

constexpr Precision tail_bits = 64;
constexpr int most_attempts = 40;

Interval largest_of(const std::vector<std::vector<Interval>>& bounds) {
  Interval largest(tail_bits);
  for (const std::vector<Interval>& row : bounds) {
    for (const Interval& bound : row) largest = larger_of(largest, bound);
  }
  return largest;
}

double log2_upper(const Interval& x) { return hull(Interval(x.precision()), x).log2_width(); }

// The pattern that bounds the others while cut-offs are chosen: the only one, or ends that are not looked at (w = 1).
EndAsk loosest(const std::vector<EndAsk>& asks) { return asks.size() == 1 ? asks.front() : EndAsk{}; }

}  // namespace

CertifiedTail certified_tail(const HeraldedChain& link, const std::vector<EndAsk>& left,
                             const std::vector<EndAsk>& right, double log2_tail) {
  std::vector<long> cutoffs = estimated_cutoffs(link, loosest(left), loosest(right), log2_tail).pairs;
  for (int attempt = 1;; ++attempt) {
    CertifiedTail tail{cutoffs, tail_by_operators(link, cutoffs, left, right, tail_bits), Interval(tail_bits)};
    tail.largest = largest_of(tail.bound);
    const double reached = log2_upper(tail.largest);
    if (reached <= log2_tail || attempt == most_attempts) return tail;
    cutoffs = raised_cutoffs(link, cutoffs, reached, log2_tail);
  }
}

}  // namespace heraldgauge::reference::pair_number
