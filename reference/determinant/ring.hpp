#pragma once
// The no-click determinant in its ring form. Going round the chain (left end, H from left to right, right end, V from
// right to left) and multiplying a 2x2 matrix from the left at each source and block,
//
//   G(S) = g(S) prod_k (1 - lam_k)^2 / (tr W - 2 kappa),  W = V R H L,
//
// kappa the product of all off-diagonals met. The H and V paths of all combinations of station blocks are built once,
// each from the one that is shorter by a station; then every pair of paths costs O(1).

#include <vector>

#include "reference/determinant/matrix.hpp"
#include "reference/determinant/station_terms.hpp"
#include "reference/model/chain.hpp"

namespace heraldgauge::reference {

// One combination of station terms: the two paths, the product of the coefficients, and the product of all station
// kappas and of the lam_k.
template <class Number>
struct Leaf {
  const Matrix<Number>& h;
  const Matrix<Number>& v;
  const Number& coefficient;
  const Number& kappa;
};

template <class Number>
class Ring {
 public:
  // patterns[k-1] are those of station k. Requires squeezed sources and threshold detectors.
  Ring(const Field<Number>& field, const model::Chain& chain,
       const std::vector<std::vector<WeightedPattern>>& patterns);

  // Calls visit(Leaf) for every combination of station terms, in a fixed order.
  template <class Visitor>
  void for_each_leaf(Visitor&& visit) const;

  const Field<Number>& field() const { return field_; }
  const Number& vacuum() const { return vacuum_; }  // prod_k (1 - lam_k)^2, one factor a mode

 private:
  void extend_paths(const StationTerms<Number>& station, const Number& lam_behind);
  template <class Visitor>
  void descend(std::size_t depth, std::size_t h_path, std::size_t v_path, std::vector<Number>& coefficients,
               std::vector<Number>& kappas, Visitor& visit) const;

  Field<Number> field_;
  std::vector<StationTerms<Number>> stations_;
  std::vector<Matrix<Number>> h_paths_,
      v_paths_;  // index: block indices of the stations as digits, the last one fastest
  Number vacuum_;
  Number product_of_lam_;
};

template <class Number>
template <class Visitor>
void Ring<Number>::for_each_leaf(Visitor&& visit) const {
  std::vector<Number> coefficients(stations_.size() + 1, field_(1L));
  std::vector<Number> kappas(stations_.size() + 1, product_of_lam_);
  descend(0, 0, 0, coefficients, kappas, visit);
}

template <class Number>
template <class Visitor>
void Ring<Number>::descend(std::size_t depth, std::size_t h_path, std::size_t v_path, std::vector<Number>& coefficients,
                           std::vector<Number>& kappas, Visitor& visit) const {
  if (depth == stations_.size()) {
    visit(Leaf<Number>{h_paths_[h_path], v_paths_[v_path], coefficients[depth], kappas[depth]});
    return;
  }
  const StationTerms<Number>& station = stations_[depth];
  for (const StationTerm<Number>& term : station.terms) {
    multiply(coefficients[depth + 1], coefficients[depth], term.coefficient);
    multiply(kappas[depth + 1], kappas[depth], term.kappa);
    descend(depth + 1, h_path * station.h_blocks.size() + term.h, v_path * station.v_blocks.size() + term.v,
            coefficients, kappas, visit);
  }
}

}  // namespace heraldgauge::reference
