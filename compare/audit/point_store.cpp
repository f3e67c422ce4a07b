#include "compare/audit/point_store.hpp"

#include "compare/parallel.hpp"

namespace heraldgauge::compare {
namespace {

// All points are forgotten where they take more than this: a table that repeats few points never gets there.
constexpr std::size_t most_bytes = std::size_t{100} << 20U;
constexpr std::size_t bytes_of_a_value = 1024;
constexpr std::size_t bytes_of_a_point = 1024;

std::size_t limbs_of(const std::optional<reference::Enclosure>& enclosure) {
  if (!enclosure) return 0;
  return mpz_size(enclosure->lower.get_num_mpz_t()) + mpz_size(enclosure->lower.get_den_mpz_t()) +
         mpz_size(enclosure->upper.get_num_mpz_t()) + mpz_size(enclosure->upper.get_den_mpz_t());
}

std::size_t size_of(const KnownPoint& point) {
  std::size_t limbs = 0;
  for (const KnownValue& value : point.values) limbs += limbs_of(value.exact) + limbs_of(value.coarse);
  return limbs * sizeof(mp_limb_t) + point.values.size() * bytes_of_a_value + bytes_of_a_point;
}

model::Faults placed(const model::Faults& faults, const std::string& place) {
  model::Faults result = faults;
  for (model::Fault& fault : result) {
    fault.location.source = place;
    fault.location.line = fault.location.column = 0;
  }
  return result;
}

}  // namespace

std::shared_ptr<KnownPoint> PointStore::find(const std::string& key) const {
  const auto found = points_.find(key);
  return found == points_.end() ? nullptr : found->second;
}

model::Faults PointStore::certify(const std::vector<Wanted>& wanted) {
  if (size_ > most_bytes) {
    points_.clear();
    size_ = 0;
  }
  std::vector<std::shared_ptr<KnownPoint>> points(wanted.size());
  std::vector<model::Faults> faults(wanted.size());
  for_each_index(wanted.size(), threads_, [&](std::size_t i) {
    auto point = know(subject_, wanted[i].changes, first_digits);
    if (point) {
      points[i] = std::make_shared<KnownPoint>(std::move(point.value()));
    } else {
      faults[i] = placed(point.faults(), wanted[i].place);
    }
  });
  model::Faults all;
  for (std::size_t i = 0; i < wanted.size(); ++i) {
    all.insert(all.end(), faults[i].begin(), faults[i].end());
    if (!points[i]) continue;
    size_ += size_of(*points[i]) + wanted[i].key.size();
    points_.emplace(wanted[i].key, std::move(points[i]));
  }
  return all;
}

void PointStore::refine(const std::vector<Refinement>& refinements) {
  for_each_index(refinements.size(), threads_, [&](std::size_t i) {
    const Refinement& one = refinements[i];
    compare::refine(subject_, *one.point, one.quantity, one.digits);
  });
}

}  // namespace heraldgauge::compare
