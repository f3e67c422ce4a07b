#include "reference/pair_number/station_operator.hpp"

#include <map>
#include <utility>

#include "reference/pair_number/dark_weights.hpp"

namespace heraldgauge::reference::pair_number {
namespace {

using model::AcceptedOutcome;
using model::Ask;

constexpr std::array<std::size_t, 2> horizontal_detectors{model::cH, model::dH};
constexpr std::array<std::size_t, 2> vertical_detectors{model::cV, model::dV};

PolarisationAsk polarisation_ask(const StationPlace& place, const AcceptedOutcome& outcome,
                                 const std::array<std::size_t, 2>& which) {
  return {{place.station.detectors[which[0]], place.station.detectors[which[1]]},
          {outcome.detectors[which[0]], outcome.detectors[which[1]]}};
}

bool same_when_exchanged(const PolarisationAsk& a, const PolarisationAsk& b) {
  return a.detectors[0] == a.detectors[1] && a.asks[0] == b.asks[1] && a.asks[1] == b.asks[0];
}

bool all_numbers_zero(const Matrix& matrix) {
  for (long row = 0; row < matrix.rows(); ++row) {
    for (long column = 0; column < matrix.columns(); ++column) {
      if (!matrix(row, column).is_exactly_zero()) return false;
    }
  }
  return true;
}

std::vector<Matrix> empty_sectors(const Extent& extent, Precision bits) {
  std::vector<Matrix> sectors;
  for (long sector = 0; sector <= extent.sectors; ++sector) {
    sectors.emplace_back(std::max(extent.first - sector + 1, 0L), std::max(extent.second - sector + 1, 0L), bits);
  }
  return sectors;
}

}  // namespace

bool operator==(const StationPlace& a, const StationPlace& b) {
  const auto same_outcomes = [&] {
    if (a.outcomes.size() != b.outcomes.size()) return false;
    for (std::size_t i = 0; i < a.outcomes.size(); ++i) {
      if (a.outcomes[i].detectors != b.outcomes[i].detectors || a.outcomes[i].minus != b.outcomes[i].minus)
        return false;
    }
    return true;
  };
  return a.station == b.station && a.first_transmittance == b.first_transmittance &&
         a.second_transmittance == b.second_transmittance && same_outcomes();
}

StationOperator::StationOperator(const StationPlace& place, long first_cut, long second_cut, long sectors,
                                 Precision bits)
    : place_(place),
      extent_{first_cut, second_cut, first_cut + second_cut, sectors},
      bits_(bits),
      has_background_(!place.station.background.photons.is_zero()) {
  for (const AcceptedOutcome& outcome : place.outcomes) {
    if (has_background_) {
      add_background_terms(outcome);
    } else {
      add_folded_terms(outcome);
    }
  }
}

void StationOperator::add_folded_terms(const AcceptedOutcome& outcome) {
  const Part horizontal = find_part(horizontal_, polarisation_ask(place_, outcome, horizontal_detectors), {0, 0});
  const Part vertical = find_part(vertical_, polarisation_ask(place_, outcome, vertical_detectors), {0, 0});
  terms_.push_back({horizontal, vertical, Interval(1L, bits_), outcome.minus});
}

void StationOperator::add_background_terms(const AcceptedOutcome& outcome) {
  const PolarisationAsk horizontal = polarisation_ask(place_, outcome, horizontal_detectors);
  const PolarisationAsk vertical = polarisation_ask(place_, outcome, vertical_detectors);
  const DetectorGroup group{
      {horizontal.detectors[0], horizontal.detectors[1], vertical.detectors[0], vertical.detectors[1]},
      {horizontal.asks[0], horizontal.asks[1], vertical.asks[0], vertical.asks[1]},
      place_.station.background,
      4};
  for (const DarkWeight& weight : dark_weights(group, bits_)) {
    terms_.push_back({find_part(horizontal_, horizontal, {weight.orders[0], weight.orders[1]}),
                      find_part(vertical_, vertical, {weight.orders[2], weight.orders[3]}), weight.weight,
                      outcome.minus});
  }
}

StationOperator::Part StationOperator::find_part(std::vector<Block>& blocks, const PolarisationAsk& ask,
                                                 const std::array<long, 2>& orders) {
  const auto order_index = [](const PolarisationAsk& of, long c, long d) {
    return static_cast<std::size_t>(c * (count_variable(of.asks[1]).top + 1) + d);
  };
  for (std::size_t i = 0; i < blocks.size(); ++i) {
    if (blocks[i].ask.asks == ask.asks) return {i, order_index(ask, orders[0], orders[1]), false};
    if (same_when_exchanged(ask, blocks[i].ask)) return {i, order_index(blocks[i].ask, orders[1], orders[0]), true};
  }
  blocks.push_back(computed_block(ask));
  return {blocks.size() - 1, order_index(ask, orders[0], orders[1]), false};
}

StationOperator::Block StationOperator::computed_block(const PolarisationAsk& ask) const {
  const DetectorGroup group{{ask.detectors[0], ask.detectors[1]}, {ask.asks[0], ask.asks[1]}, {}, 4};
  const std::vector<DarkWeight> weights = dark_weights(group, bits_);
  const CountAlgebra algebra({count_variable(ask.asks[0]), count_variable(ask.asks[1])}, 0, bits_);
  Block block{ask, {has_background_ ? weights.size() : 1, empty_sectors(extent_, bits_)}};
  Interval scratch(bits_);
  for_each_gamma_element(algebra, station_modes(ask, place_, bits_), extent_,
                         [&](long sector, long alpha, long beta, const Interval* element) {
                           for (std::size_t q = 0; q < weights.size(); ++q) {
                             Interval& target =
                                 block.orders[has_background_ ? q : 0][static_cast<std::size_t>(sector)](alpha, beta);
                             if (has_background_) {
                               target = element[q];
                               continue;
                             }
                             Interval::multiply(scratch, weights[q].weight, element[q]);
                             Interval::add(target, target, scratch);
                           }
                         });
  return block;
}

void StationOperator::add_vertical(Matrix& sum, const Term& term, long sector, bool negative) const {
  const Matrix& part = vertical_[term.vertical.block].orders[term.vertical.order][static_cast<std::size_t>(sector)];
  Interval scratch(bits_);
  for (long row = 0; row < part.rows(); ++row) {
    for (long column = 0; column < part.columns(); ++column) {
      Interval& target = sum(row, column);
      Interval::multiply(scratch, term.coefficient, part(row, column));
      if (negative) {
        Interval::subtract(target, target, scratch);
      } else {
        Interval::add(target, target, scratch);
      }
    }
  }
}

std::vector<Product> StationOperator::products(long sector, Outcomes which) const {
  const bool odd = sector % 2 != 0;
  std::map<std::pair<std::size_t, std::size_t>, Matrix> sums;
  for (const Term& term : terms_) {
    if (which != Outcomes::corrected && term.minus != (which == Outcomes::minus_only)) continue;
    const bool corrected = which == Outcomes::corrected && term.minus;
    const bool negative = odd && (corrected ^ term.horizontal.exchanged ^ term.vertical.exchanged);
    const auto place = sums.try_emplace({term.horizontal.block, term.horizontal.order}, extent_.first - sector + 1,
                                        extent_.second - sector + 1, bits_);
    add_vertical(place.first->second, term, sector, negative);
  }
  std::vector<Product> products;
  for (auto& [key, vertical] : sums) {
    const Matrix& horizontal = horizontal_[key.first].orders[key.second][static_cast<std::size_t>(sector)];
    if (all_numbers_zero(horizontal) || all_numbers_zero(vertical)) continue;
    products.push_back({&horizontal, std::move(vertical)});
  }
  return products;
}

}  // namespace heraldgauge::reference::pair_number
