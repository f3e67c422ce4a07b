#include "reference/determinant/ring.hpp"

namespace heraldgauge::reference {

template <class Number>
Ring<Number>::Ring(const Field<Number>& field, const model::Chain& chain,
                   const std::vector<std::vector<WeightedPattern>>& patterns)
    : field_(field), vacuum_(field(1L)), product_of_lam_(field(1L)) {
  for (const model::Source& source : chain.sources) {
    const Number dark = field(model::Real(1) - source.pair_parameter);
    multiply(vacuum_, vacuum_, dark);
    multiply(vacuum_, vacuum_, dark);
    multiply(product_of_lam_, product_of_lam_, field(source.pair_parameter));
  }
  h_paths_ = v_paths_ = {source_matrix(field, field(chain.sources.front().pair_parameter))};
  for (std::size_t k = 0; k < chain.station_count(); ++k) {
    stations_.push_back(
        station_terms(field, chain.stations[k], chain.right_arms[k], chain.left_arms[k + 1], patterns[k]));
    extend_paths(stations_.back(), field(chain.sources[k + 1].pair_parameter));
  }
}

// H grows at its left (last matrix met), V at its right (first matrix met); on the V path the station is entered from
// L.
template <class Number>
void Ring<Number>::extend_paths(const StationTerms<Number>& station, const Number& lam_behind) {
  Scratch<Number> scratch(field_);
  const Matrix<Number> source = source_matrix(field_, lam_behind);
  Matrix<Number> between = zero_matrix(field_);
  std::vector<Matrix<Number>> h_paths, v_paths;
  for (const Matrix<Number>& path : h_paths_) {
    for (const StationBlock<Number>& block : station.h_blocks) {
      multiply(between, block_matrix(field_, block.r, block.l, block.determinant), path, scratch);
      h_paths.push_back(zero_matrix(field_));
      multiply(h_paths.back(), source, between, scratch);
    }
  }
  for (const Matrix<Number>& path : v_paths_) {
    for (const StationBlock<Number>& block : station.v_blocks) {
      multiply(between, path, block_matrix(field_, block.l, block.r, block.determinant), scratch);
      v_paths.push_back(zero_matrix(field_));
      multiply(v_paths.back(), between, source, scratch);
    }
  }
  h_paths_ = std::move(h_paths);
  v_paths_ = std::move(v_paths);
}

template class Ring<Interval>;
template class Ring<Rational>;

}  // namespace heraldgauge::reference
