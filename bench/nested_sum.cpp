#include "bench/nested_sum.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <functional>
#include <numbers>
#include <vector>

#include "bench/fock_elements.hpp"

namespace heraldgauge::bench {
namespace {

// The pair numbers of one source in both factors of the density operator.
struct Pairs {
  int h = 0, v = 0, h_bra = 0, v_bra = 0;
};

// One detector of a polarisation clicks, the other is silent: P(silent) - P(both silent).
double click_element(const AlikeChain& chain, int r, int l, int r_bra, int l_bra) {
  const double k = chain.efficiency * chain.transmittance / 2;
  const double live = 1 - chain.dark;
  return live * second_quantised(r, l, r_bra, l_bra, 1 - k, 1 - k, k) -
         live * live * second_quantised(r, l, r_bra, l_bra, 1 - 2 * k, 1 - 2 * k, 0);
}

// Plus clicks, cross is silent.
double end_element(const AlikeChain& chain, int h, int v, int h_bra, int v_bra) {
  const double k = chain.efficiency * chain.transmittance;
  const double live = 1 - chain.dark;
  const double angle = analyser_deg * std::numbers::pi / 180;
  const double c = std::cos(angle);
  const double s = std::sin(angle);
  return live * second_quantised(h, v, h_bra, v_bra, 1 - k * s * s, 1 - k * c * c, k * s * c) -
         live * live * second_quantised(h, v, h_bra, v_bra, 1 - k, 1 - k, 0);
}

class NestedSum {
 public:
  NestedSum(const AlikeChain& chain, int pairs)
      : pairs_(pairs), numbers_(static_cast<std::size_t>(chain.stations) + 1) {
    for (int n = 0; n <= 4 * pairs; ++n) weight_.push_back(std::pow(1 - chain.lam, 2) * std::pow(chain.lam, n / 2.0));
    fill(click_, [&](int i, int j, int i_bra, int j_bra) { return click_element(chain, i, j, i_bra, j_bra); });
    fill(end_, [&](int i, int j, int i_bra, int j_bra) { return end_element(chain, i, j, i_bra, j_bra); });
  }

  double over_all_numbers(std::size_t source = 0) {
    if (source == numbers_.size()) return term();
    double sum = 0;
    for (int h = 0; h <= pairs_; ++h)
      for (int v = 0; v <= pairs_; ++v)
        for (int h_bra = 0; h_bra <= pairs_; ++h_bra)
          for (int v_bra = 0; v_bra <= pairs_; ++v_bra) {
            numbers_[source] = {h, v, h_bra, v_bra};
            sum += over_all_numbers(source + 1);
          }
    return sum;
  }

  double over_conserved_numbers() {
    double sum = 0;
    for (int delta = -pairs_; delta <= pairs_; ++delta) sum += over_conserved(0, delta);
    return sum;
  }

  double carried_over_conserved_numbers() {
    double sum = 0;
    for (int delta = -pairs_; delta <= pairs_; ++delta) sum += carried(0, delta, 1);
    return sum;
  }

 private:
  using Element = std::function<double(int, int, int, int)>;
  void fill(std::vector<double>& table, const Element& element) const {
    for (int i = 0; i <= pairs_; ++i)
      for (int j = 0; j <= pairs_; ++j)
        for (int i_bra = 0; i_bra <= pairs_; ++i_bra)
          for (int j_bra = 0; j_bra <= pairs_; ++j_bra) table.push_back(element(i, j, i_bra, j_bra));
  }

  // h' = h + delta and v' = v - delta within 0..pairs.
  double over_conserved(std::size_t source, int delta) {
    if (source == numbers_.size()) return term();
    double sum = 0;
    for (int h = std::max(0, -delta); h <= std::min(pairs_, pairs_ - delta); ++h)
      for (int v = std::max(0, delta); v <= std::min(pairs_, pairs_ + delta); ++v) {
        numbers_[source] = {h, v, h + delta, v - delta};
        sum += over_conserved(source + 1, -delta);
      }
    return sum;
  }

  double carried(std::size_t source, int delta, double product) {
    if (source == numbers_.size()) return product * at(end_, numbers_.back());
    double sum = 0;
    for (int h = std::max(0, -delta); h <= std::min(pairs_, pairs_ - delta); ++h)
      for (int v = std::max(0, delta); v <= std::min(pairs_, pairs_ + delta); ++v) {
        numbers_[source] = {h, v, h + delta, v - delta};
        sum += carried(source + 1, -delta, product * weight(source) * place_before(source));
      }
    return sum;
  }

  double term() const {
    double product = at(end_, numbers_.back());
    for (std::size_t k = 0; k < numbers_.size(); ++k) product *= weight(k) * place_before(k);
    return product;
  }

  double weight(std::size_t source) const {
    const Pairs& n = numbers_[source];
    return weight_[static_cast<std::size_t>(n.h + n.v + n.h_bra + n.v_bra)];
  }
  // The left end, or the station on the left of a source, whose two accepted patterns are alike.
  double place_before(std::size_t source) const {
    const Pairs& l = numbers_[source];
    if (source == 0) return at(end_, l);
    const Pairs& r = numbers_[source - 1];
    return 2 * at(click_, {r.h, l.h, r.h_bra, l.h_bra}) * at(click_, {r.v, l.v, r.v_bra, l.v_bra});
  }
  double at(const std::vector<double>& table, const Pairs& n) const {
    const int side = pairs_ + 1;
    return table[static_cast<std::size_t>(((n.h * side + n.v) * side + n.h_bra) * side + n.v_bra)];
  }

  int pairs_;
  std::vector<Pairs> numbers_;
  std::vector<double> weight_;  // by h + v + h' + v'
  std::vector<double> click_;   // by the photons of both arms, and the same of the other factor
  std::vector<double> end_;     // by h, v, h', v'
};

}  // namespace

double plain_nested_sum(const AlikeChain& chain, int pairs) { return NestedSum(chain, pairs).over_all_numbers(); }
double number_conserving_sum(const AlikeChain& chain, int pairs) {
  return NestedSum(chain, pairs).over_conserved_numbers();
}
double number_conserving_sum_carried(const AlikeChain& chain, int pairs) {
  return NestedSum(chain, pairs).carried_over_conserved_numbers();
}

}  // namespace heraldgauge::bench
