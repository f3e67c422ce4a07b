#include "reference/pair_number/gamma_elements.hpp"

#include <algorithm>
#include <vector>

namespace heraldgauge::reference::pair_number {
namespace {

// Holds g_D(alpha, beta) of the current alpha for all D and beta, and moves from alpha to alpha + 1 in place.
class Recurrence {
 public:
  Recurrence(const CountAlgebra& algebra, const ModePair& modes, const Extent& extent)
      : extent_(extent),
        size_(algebra.size()),
        a_(algebra.multiplier(modes.a)),
        b_(algebra.multiplier(modes.b)),
        x_(algebra.multiplier(modes.x)),
        x_down_(algebra.multiplier(modes.x_down)),
        last_sector_(std::min({std::max(extent.sectors, 1L), extent.first, extent.second, extent.total})),
        fresh_(static_cast<std::size_t>(size_), Interval(algebra.bits())),
        scratch_(algebra.bits()) {
    for (long sector = 0; sector <= last_sector_; ++sector) {
      const long columns = std::min(extent.second, extent.total) - sector + 1;
      rows_.emplace_back(static_cast<std::size_t>(columns * size_), Interval(algebra.bits()));
    }
    start(algebra.place({0, 0}, 0));
  }

  long last_sector(long alpha) const { return std::min(last_sector_, std::min(extent_.first, extent_.total) - alpha); }
  long last_beta(long sector, long alpha) const { return std::min(extent_.second, extent_.total - alpha) - sector; }
  Interval* at(long sector, long beta) { return rows_[static_cast<std::size_t>(sector)].data() + beta * size_; }

  void advance_to(long alpha) {
    for (long beta = last_beta(0, alpha); beta >= 0; --beta) diagonal(alpha, beta);
    for (long sector = 1; sector <= last_sector(alpha); ++sector) {
      for (long beta = 0; beta <= last_beta(sector, alpha); ++beta) {
        clear(fresh_);
        a_.multiply_add(fresh_.data(), at(sector, beta), scratch_);
        x_.multiply_add(fresh_.data(), at(sector - 1, beta), scratch_);
        store(at(sector, beta));
      }
    }
  }

 private:
  void start(long unit) {
    mpfi_set_si(at(0, 0)[unit].raw(), 1);
    for (long beta = 1; beta <= last_beta(0, 0); ++beta) b_.multiply_add(at(0, beta), at(0, beta - 1), scratch_);
    for (long sector = 1; sector <= last_sector(0); ++sector) {
      for (long beta = 0; beta <= last_beta(sector, 0); ++beta) {
        x_.multiply_add(at(sector, beta), at(sector - 1, beta), scratch_);
      }
    }
  }

  void diagonal(long alpha, long beta) {
    clear(fresh_);
    if (beta > 0 && last_sector_ > 0) {
      x_down_.multiply_add(fresh_.data(), at(1, beta - 1), scratch_);
      for (Interval& coefficient : fresh_) {
        mpfi_mul_si(coefficient.raw(), coefficient.raw(), beta);
        mpfi_div_si(coefficient.raw(), coefficient.raw(), alpha);
      }
    }
    a_.multiply_add(fresh_.data(), at(0, beta), scratch_);
    store(at(0, beta));
  }

  static void clear(std::vector<Interval>& element) {
    for (Interval& coefficient : element) mpfi_set_si(coefficient.raw(), 0);
  }
  void store(Interval* place) {
    for (long i = 0; i < size_; ++i) std::swap(place[i], fresh_[static_cast<std::size_t>(i)]);
  }

  Extent extent_;
  long size_;
  CountAlgebra::Multiplier a_, b_, x_, x_down_;
  long last_sector_;
  std::vector<Interval> fresh_;
  Interval scratch_;
  std::vector<std::vector<Interval>> rows_;
};

}  // namespace

void for_each_gamma_element(const CountAlgebra& algebra, const ModePair& modes, const Extent& extent,
                            const ElementVisitor& visit) {
  Recurrence recurrence(algebra, modes, extent);
  for (long alpha = 0; alpha <= std::min(extent.first, extent.total); ++alpha) {
    if (alpha > 0) recurrence.advance_to(alpha);
    for (long sector = 0; sector <= std::min(extent.sectors, recurrence.last_sector(alpha)); ++sector) {
      for (long beta = 0; beta <= recurrence.last_beta(sector, alpha); ++beta) {
        visit(sector, alpha, beta, recurrence.at(sector, beta));
      }
    }
  }
}

}  // namespace heraldgauge::reference::pair_number
