#pragma once
// The number that lies in most of several intervals, written as shortly as they allow.

#include <optional>
#include <string>
#include <vector>

namespace heraldgauge::compare {

struct Span {
  double lower, upper;
};

struct Overlap {
  Span common;        // of the intervals counted
  std::size_t count;  // how many of them overlap there
};

// The first place where most intervals overlap; nothing where there are none. Empty and unbounded intervals are left
// out.
std::optional<Overlap> largest_overlap(const std::vector<Span>& spans);

// A number in the span with as few digits as possible, and its text. Of a factor: one of the usual constants (powers of
// ten, 2, ln 2, ...) where one lies inside.
struct ShortNumber {
  double value;
  std::string text;
};
enum class Meaning { factor, amount };
ShortNumber shortest_in(const Span& span, Meaning meaning);

}  // namespace heraldgauge::compare
