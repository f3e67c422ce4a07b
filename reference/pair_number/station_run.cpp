#include "reference/pair_number/station_run.hpp"

#include <bit>

namespace heraldgauge::reference::pair_number {
namespace {

// The numbers of a state with a + b < rows.
long state_size(long rows) { return rows * (rows + 1) / 2; }

// Calls visit(index, a, b) for each of them.
template <class Visitor>
void for_each_number(long rows, Visitor&& visit) {
  long index = 0;
  for (long a = 0; a < rows; ++a) {
    for (long b = 0; a + b < rows; ++b) visit(index++, a, b);
  }
}

// How many states a step mixes.
std::size_t mixed_states(Strings strings) { return strings == Strings::by_parity ? 2 : 1; }

// Adds weight(c + d + D) sum over products of H(a, c) V(b, d) at row (c, d) and column (a, b) of the block at `top` and
// `left`.
void add_block(Matrix& out, long top, long left, const std::vector<Product>& products, const SectorStep& step,
               long rows) {
  Interval scratch(out(0, 0).precision());
  for_each_number(rows, [&](long row, long c, long d) {
    for_each_number(rows, [&](long column, long a, long b) {
      Interval& target = out(top + row, left + column);
      for (const Product& product : products) {
        Interval::multiply(scratch, (*product.horizontal)(a, c), product.vertical(b, d));
        Interval::add(target, target, scratch);
      }
      target *= step.weights[static_cast<std::size_t>(c + d + step.sector)];
    });
  });
}

Matrix step_matrix(const SectorStep& step, long rows, Precision bits) {
  const long size = state_size(rows);
  const long blocks = static_cast<long>(mixed_states(step.strings));
  Matrix matrix(blocks * size, blocks * size, bits);
  for (long i = 0; i < blocks; ++i) {
    for (long j = 0; j < blocks; ++j) {
      add_block(matrix, i * size, j * size, i == j ? step.keeping : step.changing, step, rows);
    }
  }
  return matrix;
}

Matrix multiplied(const Matrix& a, const Matrix& b, Precision bits) {
  Matrix out(a.rows(), b.columns(), bits);
  Interval scratch(bits);
  for (long row = 0; row < a.rows(); ++row) {
    for (long i = 0; i < a.columns(); ++i) {
      for (long column = 0; column < b.columns(); ++column) {
        Interval::multiply(scratch, a(row, i), b(i, column));
        Interval::add(out(row, column), out(row, column), scratch);
      }
    }
  }
  return out;
}

// The states side by side as columns, those that a step mixes one below the other.
Matrix as_columns(const std::vector<Matrix>& states, std::size_t mixed, Precision bits) {
  const long rows = states.front().rows();
  const long size = state_size(rows);
  Matrix columns(static_cast<long>(mixed) * size, static_cast<long>(states.size() / mixed), bits);
  for (std::size_t s = 0; s < states.size(); ++s) {
    for_each_number(rows, [&](long index, long a, long b) {
      columns(static_cast<long>(s % mixed) * size + index, static_cast<long>(s / mixed)) = states[s](a, b);
    });
  }
  return columns;
}

std::vector<Matrix> as_states(const Matrix& columns, std::size_t mixed, long rows, Precision bits) {
  const long size = state_size(rows);
  std::vector<Matrix> states(static_cast<std::size_t>(columns.columns()) * mixed, Matrix(rows, rows, bits));
  for (std::size_t s = 0; s < states.size(); ++s) {
    for_each_number(rows, [&](long index, long a, long b) {
      states[s](a, b) = columns(static_cast<long>(s % mixed) * size + index, static_cast<long>(s / mixed));
    });
  }
  return states;
}

void accumulate_all(Matrix& out, const std::vector<Product>& products, const Matrix& in) {
  for (const Product& product : products) accumulate(out, product, in);
}

}  // namespace

std::size_t run_length(const HeraldedChain& link, const std::vector<long>& cutoffs, std::size_t k) {
  const std::vector<model::Source>& sources = link.chain.sources;
  if (cutoffs[k] != cutoffs[k + 1]) return 1;
  const StationPlace first = link.station(k);
  std::size_t next = k + 1;
  while (next < link.station_count() && cutoffs[next + 1] == cutoffs[k] && sources[next + 1] == sources[k + 1] &&
         link.station(next) == first) {
    ++next;
  }
  return next - k;
}

SectorStep::SectorStep(const StationOperator& station, Strings way, long in_sector,
                       const std::vector<Interval>& weights_behind)
    : sector(in_sector), strings(way), weights(weights_behind) {
  if (strings == Strings::corrected) {
    keeping = station.products(sector, Outcomes::corrected);
  } else {
    keeping = station.products(sector, Outcomes::plus_only);
    changing = station.products(sector, Outcomes::minus_only);
  }
}

std::vector<Matrix> stepped(const SectorStep& step, const std::vector<Matrix>& states, long rows, Precision bits) {
  std::vector<Matrix> after(states.size(), Matrix(rows, rows, bits));
  for (std::size_t s = 0; s < states.size(); ++s) {
    accumulate_all(after[s], step.keeping, states[s]);
    if (step.strings == Strings::by_parity) accumulate_all(after[s], step.changing, states[s ^ 1]);
    apply_weights(after[s], step.sector, step.weights);
  }
  return after;
}

std::vector<Matrix> powered(const SectorStep& step, std::size_t length, const std::vector<Matrix>& states,
                            Precision bits) {
  const std::size_t mixed = mixed_states(step.strings);
  const long rows = states.front().rows();
  Matrix columns = as_columns(states, mixed, bits);
  Matrix power = step_matrix(step, rows, bits);
  for (std::size_t rest = length; rest > 0; rest /= 2) {
    if (rest % 2 == 1) columns = multiplied(power, columns, bits);
    if (rest > 1) power = multiplied(power, power, bits);
  }
  return as_states(columns, mixed, rows, bits);
}

double stepping_cost(const RunSize& run) {
  const double size = static_cast<double>(state_size(run.rows));
  const double half_products = 2 * static_cast<double>(run.products) * static_cast<double>(run.rows) * size;
  return static_cast<double>(run.length) * static_cast<double>(run.states) * (half_products + size);
}

double doubling_cost(const RunSize& run) {
  const double mixed = static_cast<double>(mixed_states(run.strings));
  const double size = mixed * static_cast<double>(state_size(run.rows));
  const double columns = static_cast<double>(run.states) / mixed;
  const double entry = static_cast<double>(run.products) / mixed + 1;  // the products, and the weight
  const double squarings = static_cast<double>(std::bit_width(run.length) - 1);
  return size * size * (entry + size * squarings + columns * std::popcount(run.length));
}

std::vector<Matrix> through_run(const SectorStep& step, std::size_t length, std::vector<Matrix> states, long rows,
                                Precision bits) {
  const RunSize run{length, rows, states.size(), step.keeping.size() + step.changing.size(), step.strings};
  if (length > 1 && doubling_cost(run) < stepping_cost(run)) return powered(step, length, states, bits);
  for (std::size_t i = 0; i < length; ++i) states = stepped(step, states, rows, bits);
  return states;
}

}  // namespace heraldgauge::reference::pair_number
