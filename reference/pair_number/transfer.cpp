#include "reference/pair_number/transfer.hpp"

#include <algorithm>

#include "reference/pair_number/source_weights.hpp"
#include "reference/pair_number/station_run.hpp"
#include "reference/pair_number/station_sequence.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

void apply_weights_to_all(std::vector<SectorStack>& states, const std::vector<Interval>& weights) {
  for (SectorStack& state : states) {
    for (std::size_t sector = 0; sector < state.size(); ++sector) {
      apply_weights(state[sector], static_cast<long>(sector), weights);
    }
  }
}

// The matrices of one sector, taken out of all states.
std::vector<Matrix> taken_sector(std::vector<SectorStack>& states, long sector) {
  std::vector<Matrix> matrices;
  for (SectorStack& state : states) matrices.push_back(std::move(state[static_cast<std::size_t>(sector)]));
  return matrices;
}

void put_sector(std::vector<SectorStack>& states, long sector, std::vector<Matrix> matrices) {
  for (std::size_t s = 0; s < states.size(); ++s) states[s][static_cast<std::size_t>(sector)] = std::move(matrices[s]);
}

}  // namespace

long sectors_within(const std::vector<long>& cutoffs) { return *std::min_element(cutoffs.begin(), cutoffs.end()); }

void apply_weights(Matrix& state, long sector, const std::vector<Interval>& weights) {
  for (long a = 0; a < state.rows(); ++a) {
    for (long b = 0; a + b < state.rows(); ++b) state(a, b) *= weights[static_cast<std::size_t>(a + b + sector)];
  }
}

void accumulate(Matrix& out, const Product& product, const Matrix& in) {
  const Matrix& horizontal = *product.horizontal;
  const Matrix& vertical = product.vertical;
  Interval scratch(out.rows() > 0 ? out(0, 0).precision() : 2);
  Matrix half(in.rows(), out.rows(), scratch.precision());  // (b, c): sum_a H(a, c) in(a, b)
  for (long b = 0; b < in.rows(); ++b) {
    for (long a = 0; a + b < in.rows(); ++a) {
      for (long c = 0; c < out.rows(); ++c) {
        Interval::multiply(scratch, horizontal(a, c), in(a, b));
        Interval::add(half(b, c), half(b, c), scratch);
      }
    }
  }
  for (long b = 0; b < in.rows(); ++b) {
    for (long c = 0; c < out.rows(); ++c) {
      for (long d = 0; c + d < out.rows(); ++d) {
        Interval::multiply(scratch, half(b, c), vertical(b, d));
        Interval::add(out(c, d), out(c, d), scratch);
      }
    }
  }
}

std::vector<SectorStack> contract_stations(const HeraldedChain& link, const std::vector<long>& cutoffs, Strings strings,
                                           std::vector<SectorStack> states, Precision bits) {
  const long sectors = static_cast<long>(states.front().size()) - 1;
  apply_weights_to_all(states, state_weights(link.chain.sources.front(), cutoffs.front(), bits));
  StationSequence stations(link, cutoffs, sectors, bits);
  std::size_t length = 0;
  for (std::size_t k = 0; k < link.station_count(); k += length) {
    length = run_length(link, cutoffs, k);
    const StationOperator& station = stations.at(k);
    const std::vector<Interval> weights = state_weights(link.chain.sources[k + 1], cutoffs[k + 1], bits);
    for (long sector = 0; sector <= sectors; ++sector) {
      const SectorStep step(station, strings, sector, weights);
      std::vector<Matrix> before = taken_sector(states, sector);
      put_sector(states, sector, through_run(step, length, std::move(before), cutoffs[k + 1] - sector + 1, bits));
    }
  }
  return states;
}

Interval close_chain(const SectorStack& state, const SectorStack& end, Precision bits) {
  Interval sum(bits);
  Interval scratch(bits);
  for (std::size_t sector = 0; sector < state.size(); ++sector) {
    Interval part(bits);
    const Matrix& vector = state[sector];
    for (long a = 0; a < vector.rows(); ++a) {
      for (long b = 0; a + b < vector.rows(); ++b) {
        Interval::multiply(scratch, vector(a, b), end[sector](a, b));
        Interval::add(part, part, scratch);
      }
    }
    sum += sector == 0 ? part : part * 2;
  }
  return sum;
}

}  // namespace heraldgauge::reference::pair_number
