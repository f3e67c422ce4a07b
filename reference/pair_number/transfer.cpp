#include "reference/pair_number/transfer.hpp"

#include <algorithm>

#include "reference/pair_number/source_weights.hpp"
#include "reference/pair_number/station_sequence.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

SectorStack empty_stack(long cut, long sectors, Precision bits) {
  SectorStack stack;
  for (long sector = 0; sector <= sectors; ++sector) stack.emplace_back(cut - sector + 1, cut - sector + 1, bits);
  return stack;
}

void accumulate_all(Matrix& out, const std::vector<Product>& products, const Matrix& in) {
  for (const Product& product : products) accumulate(out, product, in);
}

// One sector of all states through one station.
void step_sector(const StationOperator& station, Strings strings, long sector, const std::vector<SectorStack>& before,
                 std::vector<SectorStack>& after) {
  const auto place = static_cast<std::size_t>(sector);
  if (strings == Strings::corrected) {
    const std::vector<Product> products = station.products(sector, Outcomes::corrected);
    for (std::size_t s = 0; s < before.size(); ++s) accumulate_all(after[s][place], products, before[s][place]);
    return;
  }
  const std::vector<Product> plus = station.products(sector, Outcomes::plus_only);
  const std::vector<Product> minus = station.products(sector, Outcomes::minus_only);
  for (std::size_t s = 0; s < before.size(); ++s) {
    accumulate_all(after[s][place], plus, before[s][place]);
    accumulate_all(after[s][place], minus, before[s ^ 1][place]);
  }
}

void apply_weights_to_all(std::vector<SectorStack>& states, const std::vector<Interval>& weights) {
  for (SectorStack& state : states) {
    for (std::size_t sector = 0; sector < state.size(); ++sector) {
      apply_weights(state[sector], static_cast<long>(sector), weights);
    }
  }
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
  for (std::size_t k = 0; k < link.station_count(); ++k) {
    const StationOperator& station = stations.at(k);
    std::vector<SectorStack> after(states.size(), empty_stack(cutoffs[k + 1], sectors, bits));
    for (long sector = 0; sector <= sectors; ++sector) step_sector(station, strings, sector, states, after);
    apply_weights_to_all(after, state_weights(link.chain.sources[k + 1], cutoffs[k + 1], bits));
    states = std::move(after);
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
