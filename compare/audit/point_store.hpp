#pragma once
// The distinct points of a table with what is certified at each, in bounded memory.

#include <memory>
#include <string>
#include <unordered_map>
#include <vector>

#include "compare/audit/known_point.hpp"

namespace heraldgauge::compare {

class PointStore {
 public:
  // A point as a row of the table sets it: its cells joined, and the row they stand in.
  struct Wanted {
    std::string key;
    Changes changes;
    std::string place;
  };
  // More digits for one quantity of a point.
  struct Refinement {
    std::shared_ptr<KnownPoint> point;
    std::size_t quantity;
    int digits;
    friend bool operator==(const Refinement&, const Refinement&) = default;
  };

  PointStore(const Subject& subject, unsigned threads) : subject_(subject), threads_(threads) {}

  // The point of that key, or null where it was never certified or is forgotten.
  std::shared_ptr<KnownPoint> find(const std::string& key) const;
  // Certifies points that are new, in parallel; faults carry the place of the row.
  model::Faults certify(const std::vector<Wanted>& wanted);
  // Certifies quantities further; each (point, quantity) at most once.
  void refine(const std::vector<Refinement>& refinements);

 private:
  const Subject& subject_;
  unsigned threads_;
  std::unordered_map<std::string, std::shared_ptr<KnownPoint>> points_;
  std::size_t size_ = 0;  // bytes, about
};

}  // namespace heraldgauge::compare
