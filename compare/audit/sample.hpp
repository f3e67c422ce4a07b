#pragma once
// The numbers of a table that the search for causes looks at: all of a small table, of a large one a selection spread
// over it.

#include <cstddef>
#include <string>
#include <vector>

#include "compare/audit/verdict.hpp"

namespace heraldgauge::compare {

// One number with what it was compared to.
struct Datum {
  Changes changes;
  std::size_t quantity = 0;  // index among those judged
  std::size_t line = 0;
  model::Rational given;
  Acceptance acceptance;
  reference::Enclosure exact;
  Verdict verdict = Verdict::agrees;

  bool wrong() const { return verdict == Verdict::differs || verdict == Verdict::impossible; }
};

// Keeps up to twice `capacity` elements of a sequence, every 2^k-th of it.
template <class T>
class SpreadSelection {
 public:
  explicit SpreadSelection(std::size_t capacity) : capacity_(capacity) {}

  // Whether the element that comes next would be kept.
  bool takes_next() const { return seen_ % stride_ == 0; }
  void skip() { ++seen_; }
  void add(T element) {
    ++seen_;
    kept_.push_back(std::move(element));
    if (kept_.size() < 2 * capacity_) return;
    for (std::size_t i = 0; 2 * i < kept_.size(); ++i) kept_[i] = std::move(kept_[2 * i]);
    kept_.resize(kept_.size() / 2);
    stride_ *= 2;
  }
  const std::vector<T>& kept() const { return kept_; }

 private:
  std::size_t capacity_;
  std::size_t seen_ = 0;
  std::size_t stride_ = 1;
  std::vector<T> kept_;
};

// Numbers that are wrong and numbers that agree are selected apart, so that neither crowds out the other.
class Sample {
 public:
  void add(const JudgedNumber& judged, const KnownPoint& point, std::size_t quantity, std::size_t line);
  // In the order of the table.
  std::vector<Datum> data() const;
  bool any_wrong() const { return !wrong_.kept().empty(); }

 private:
  static constexpr std::size_t capacity = 128;
  SpreadSelection<Datum> wrong_{capacity};
  SpreadSelection<Datum> right_{capacity};
};

}  // namespace heraldgauge::compare
