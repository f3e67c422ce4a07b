#include <algorithm>
#include <numeric>

#include "reference/model/reading/keys.hpp"

namespace heraldgauge::model::reading {
namespace {

// Edit distance: insertions, deletions and replacements of single letters.
std::size_t distance(std::string_view a, std::string_view b) {
  std::vector<std::size_t> row(b.size() + 1);
  std::iota(row.begin(), row.end(), std::size_t{0});
  for (std::size_t i = 1; i <= a.size(); ++i) {
    std::size_t diagonal = row[0];
    row[0] = i;
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const std::size_t replaced = diagonal + (a[i - 1] == b[j - 1] ? 0 : 1);
      diagonal = row[j];
      row[j] = std::min({replaced, row[j] + 1, row[j - 1] + 1});
    }
  }
  return row[b.size()];
}

}  // namespace

std::string nearest_name(std::string_view written, const std::vector<std::string>& names) {
  std::string nearest;
  std::size_t least = written.size() / 3 + 1;
  for (const std::string& name : names) {
    const std::size_t apart = distance(written, name);
    if (apart < least) {
      least = apart;
      nearest = name;
    }
  }
  return nearest;
}

}  // namespace heraldgauge::model::reading
