#pragma once
// The operator of one station, sector by sector, as a sum of products (H part) x (V part).
//
// In the sector Delta = D >= 0 the H part takes the numbers (alpha + D, beta) of the two arms to (alpha, beta + D),
// alpha on the right arm of the source before, beta on the left arm of the source behind, and the V part the other way
// round; both are the symmetric g_D(alpha, beta) of gamma_elements.hpp, without its square roots, which cancel between
// neighbouring places (transfer.hpp).

#include <vector>

#include "reference/model/chain.hpp"
#include "reference/model/pattern.hpp"
#include "reference/pair_number/gamma_elements.hpp"
#include "reference/pair_number/matrix.hpp"

namespace heraldgauge::reference::pair_number {

// A station with the transmittances of the two arms that meet there and the click patterns it accepts.
struct StationPlace {
  model::Station station;
  model::Real first_transmittance;   // t_R: the right arm of the source before
  model::Real second_transmittance;  // t_L: the left arm of the source behind
  std::vector<model::AcceptedOutcome> outcomes;
};
bool operator==(const StationPlace& a, const StationPlace& b);

// Which outcomes: all, with the sign (-1)^D on psi- that corrects it (V reversed at the right end), or one kind alone.
enum class Outcomes { corrected, plus_only, minus_only };

// Matrices with rows alpha <= cut of the source before - D and columns beta <= cut of the source behind - D.
struct Product {
  const Matrix* horizontal;
  Matrix vertical;
};

// The detectors c and d of one polarisation and what is asked of them.
struct PolarisationAsk {
  std::array<model::Detector, 2> detectors;
  std::array<model::Ask, 2> asks;
};

// Modes R and L of one polarisation at a station: a = 1 - sum eta t_R/2, b = 1 - sum eta t_L/2, x = -sum +-eta g/2 with
// g = sqrt(t_R t_L v), over the detectors looked at; plus for c, minus for d; each eta times (1 - z).
ModePair station_modes(const PolarisationAsk& ask, const StationPlace& place, Precision bits);

class StationOperator {
 public:
  // Sectors 0..sectors, for neighbouring sources that keep first_cut and second_cut pairs.
  StationOperator(const StationPlace& place, long first_cut, long second_cut, long sectors, Precision bits);

  // Valid as long as this operator lives. At sector 0 no element is negative.
  std::vector<Product> products(long sector, Outcomes which) const;

 private:
  using Sectors = std::vector<Matrix>;
  struct Block {
    PolarisationAsk ask;
    std::vector<Sectors>
        orders;  // photon operators by order of (c, d), d fastest; one operator where darks are folded in
  };
  struct Part {
    std::size_t block;
    std::size_t order;
    bool exchanged;  // c and d of the block change roles, which changes the sign of odd sectors
  };
  struct Term {
    Part horizontal, vertical;
    Interval coefficient;
    bool minus;
  };

  void add_folded_terms(const model::AcceptedOutcome& outcome);
  void add_background_terms(const model::AcceptedOutcome& outcome);
  Part find_part(std::vector<Block>& blocks, const PolarisationAsk& ask, const std::array<long, 2>& orders);
  Block computed_block(const PolarisationAsk& ask) const;
  void add_vertical(Matrix& sum, const Term& term, long sector, bool negative) const;

  StationPlace place_;
  Extent extent_;
  Precision bits_;
  bool has_background_;
  std::vector<Block> horizontal_, vertical_;
  std::vector<Term> terms_;
};

}  // namespace heraldgauge::reference::pair_number
