#pragma once
// The settings of a document and of `--set`, each under its full key, before their values are read.

#include <deque>
#include <set>

#include "reference/model/reading/document.hpp"
#include "reference/model/reading/keys.hpp"

namespace heraldgauge::model::reading {

// Gathers faults, each once.
class Collector {
 public:
  void add(Fault fault);
  void add(const Faults& faults);
  bool empty() const { return faults_.empty(); }

  // In the order of the document; what has no place in it comes last.
  Faults in_order() const;

 private:
  Faults faults_;
  std::set<std::string> seen_;
};

struct Item {
  std::string name;
  const Key* key;
  const Node* node;
  Location location;
};

struct Items {
  std::vector<Item> settings;
  std::vector<Location> sweep_places;  // of each [[sweep]]
  std::vector<const Node*> sweep_tables;
  std::deque<Node> assigned;  // the values of `--set`, which settings point to
};

// Unknown keys, addresses outside [override], other keys inside it and keys given twice are faults. `root` must outlive
// the result.
Items collect_items(const Node& root, const std::vector<Assignment>& assignments, const std::string& source,
                    Collector& faults);

// The fault of a key that the registry does not have.
Fault unknown_key(const Location& location);

}  // namespace heraldgauge::model::reading
