#pragma once
// A run of L like steps, a step being a station and the source behind it: like stations between sources that keep
// equally many pairs, with like sources behind them. In each sector a step is one fixed linear map on the states
// X_D(a, b), a + b <= cut - D, so the run is its L-th power, which doubling takes in about log2 L squarings. Where
// states are small (ideal pairs: 3 numbers at D = 0) that costs far less than L steps.
//
// Width: every entry of a power is a sum of products of entries of the step, as a stepped state is, and where the
// entries have one sign the relative width of either grows by (operations in a row) * 2^-bits a station. The enclosures
// differ in width by about the number of states over twice that of rows.

#include <vector>

#include "reference/pair_number/transfer.hpp"

namespace heraldgauge::reference::pair_number {

// The number of like steps from station k = 0..N-1 on, at least 1.
std::size_t run_length(const HeraldedChain& link, const std::vector<long>& cutoffs, std::size_t k);

// One step in one sector. Where psi- is corrected, `keeping` are all products; by parity, the states come in pairs
// (even, odd), and `changing` are the products of psi-, which exchange the two.
// The weights have to outlive the step.
struct SectorStep {
  SectorStep(const StationOperator& station, Strings strings, long sector, const std::vector<Interval>& weights);

  long sector;
  Strings strings;
  std::vector<Product> keeping, changing;
  const std::vector<Interval>& weights;  // of the source behind
};

// The states after one step, `rows` = cut of the source behind - sector + 1.
std::vector<Matrix> stepped(const SectorStep& step, const std::vector<Matrix>& states, long rows, Precision bits);

// The states after `length` steps, by doubling; the cut-offs of both sources of the step have to agree.
std::vector<Matrix> powered(const SectorStep& step, std::size_t length, const std::vector<Matrix>& states,
                            Precision bits);

// What a run costs in interval multiplications.
struct RunSize {
  std::size_t length;
  long rows;             // cut - sector + 1
  std::size_t states;    // by parity: both of each pair counted
  std::size_t products;  // of the station, psi+ and psi- together
  Strings strings;
};
double stepping_cost(const RunSize& run);
double doubling_cost(const RunSize& run);

// The states after a run, whichever way costs less.
std::vector<Matrix> through_run(const SectorStep& step, std::size_t length, std::vector<Matrix> states, long rows,
                                Precision bits);

}  // namespace heraldgauge::reference::pair_number
