#include "reference/determinant/plain_determinant.hpp"

#include <algorithm>
#include <utility>

#include "reference/optics/dark_events.hpp"

namespace heraldgauge::reference {
namespace {

using model::Ask;
using model::Chain;
using SquareMatrix = std::vector<std::vector<Interval>>;

constexpr std::size_t polarisations = 2;  // H, V

SquareMatrix zeros(std::size_t size, Precision bits) { return {size, std::vector<Interval>(size, Interval(bits))}; }

// 1 - K for the arms of class A (first) and class B (second); mode (source k, polarisation p) has index 2 k + p.
class ModeMatrices {
 public:
  ModeMatrices(const Chain& chain, Precision bits) : chain_(chain), bits_(bits), classes_{one(), one()} {}

  void add_station(std::size_t k, unsigned silent) {  // station k + 1 joins R_k and L_{k+1}
    const model::Station& station = chain_.stations[k];
    const Interval t_r = enclose(chain_.right_arms[k].transmittance, bits_);
    const Interval t_l = enclose(chain_.left_arms[k + 1].transmittance, bits_);
    const Interval mixed = square_root(t_r * t_l * enclose(station.indistinguishability, bits_));
    SquareMatrix& x = classes_[class_of_right_arm(k)];
    for (std::size_t j = 0; j < station.detectors.size(); ++j) {
      if ((silent >> j & 1U) == 0) continue;
      const std::size_t polarisation = j % polarisations;
      const long sign = j < polarisations ? 1 : -1;  // c plus, d minus
      const Interval half = enclose(station.detectors[j].registering_probability() / model::Real(2), bits_);
      const std::size_t r = polarisations * k + polarisation, l = r + polarisations;
      x[r][r] -= half * t_r;
      x[l][l] -= half * t_l;
      x[r][l] -= half * mixed * sign;
      x[l][r] -= half * mixed * sign;
    }
  }

  void add_end(const model::End& end, const Rational& degrees, bool left, unsigned silent) {
    const std::size_t k = left ? 0 : chain_.station_count();
    const model::Arm& arm = left ? chain_.left_arms.front() : chain_.right_arms.back();
    SquareMatrix& x = classes_[left ? 1 - class_of_right_arm(0) : class_of_right_arm(k)];
    const Interval c = cosine_of_degrees(degrees, bits_), s = sine_of_degrees(degrees, bits_);
    const std::array<std::array<Interval, 2>, 2> rows = {{{c, s}, {-s, c}}};  // plus, cross
    for (std::size_t j = 0; j < end.detectors.size(); ++j) {
      if ((silent >> j & 1U) == 0) continue;
      const Interval weight = enclose(end.detectors[j].registering_probability() * arm.transmittance, bits_);
      for (std::size_t p = 0; p < polarisations; ++p) {
        for (std::size_t q = 0; q < polarisations; ++q) {
          x[polarisations * k + p][polarisations * k + q] -= weight * rows[j][p] * rows[j][q];
        }
      }
    }
  }

  // 1 - sqrt(Lam) X_A sqrt(Lam) X_B^T
  SquareMatrix kernel() const {
    const std::size_t size = polarisations * chain_.sources.size();
    std::vector<Interval> root;
    for (std::size_t i = 0; i < size; ++i) {
      root.push_back(square_root(enclose(chain_.sources[i / polarisations].pair_parameter, bits_)));
    }
    SquareMatrix result = one();
    for (std::size_t i = 0; i < size; ++i) {
      for (std::size_t j = 0; j < size; ++j) {
        for (std::size_t m = 0; m < size; ++m) {
          result[i][j] -= root[i] * classes_[0][i][m] * root[m] * classes_[1][j][m];
        }
      }
    }
    return result;
  }

 private:
  // L_0 is in A, so R_0 and L_1 are in B, R_1 and L_2 in A, and so on.
  static std::size_t class_of_right_arm(std::size_t k) { return k % 2 == 0 ? 1 : 0; }

  SquareMatrix one() const {
    SquareMatrix matrix = zeros(polarisations * chain_.sources.size(), bits_);
    for (std::size_t i = 0; i < matrix.size(); ++i) matrix[i][i] = Interval(1L, bits_);
    return matrix;
  }

  const Chain& chain_;
  Precision bits_;
  std::array<SquareMatrix, 2> classes_;
};

// What a pattern asks of one place, as masks.
struct Masks {
  unsigned clicking = 0;
  unsigned silent = 0;
};

template <std::size_t Count>
Masks masks_of(const std::array<Ask, Count>& asks) {
  Masks masks;
  for (std::size_t j = 0; j < Count; ++j) {
    if (asks[j].kind == Ask::Kind::clicks) masks.clicking |= 1U << j;
    if (asks[j].kind == Ask::Kind::silent) masks.silent |= 1U << j;
  }
  return masks;
}

// Visits every choice of one subset of clicking detectors a place, with the sign of inclusion-exclusion.
template <class Visitor>
void for_each_choice(const std::vector<Masks>& places, std::size_t place, std::vector<unsigned>& silent, int sign,
                     const Visitor& visit) {
  if (place == places.size()) {
    visit(silent, sign);
    return;
  }
  const Masks& masks = places[place];
  for (unsigned subset = masks.clicking;; subset = (subset - 1) & masks.clicking) {
    silent[place] = subset | masks.silent;
    for_each_choice(places, place + 1, silent, __builtin_popcount(subset) % 2 == 0 ? sign : -sign, visit);
    if (subset == 0) return;
  }
}

}  // namespace

Interval determinant(SquareMatrix matrix, Precision bits) {
  Interval product(1L, bits);
  for (std::size_t column = 0; column < matrix.size(); ++column) {
    const auto farthest = std::max_element(
        matrix.begin() + static_cast<long>(column), matrix.end(),
        [column](const auto& a, const auto& b) { return a[column].log2_mignitude() < b[column].log2_mignitude(); });
    if ((*farthest)[column].contains_zero()) return product / Interval(bits);
    if (farthest != matrix.begin() + static_cast<long>(column)) {
      std::swap(*farthest, matrix[column]);
      product = -product;
    }
    const std::vector<Interval>& pivot = matrix[column];
    product *= pivot[column];
    for (std::size_t row = column + 1; row < matrix.size(); ++row) {
      const Interval factor = matrix[row][column] / pivot[column];
      for (std::size_t j = column; j < matrix.size(); ++j) matrix[row][j] -= factor * pivot[j];
    }
  }
  return product;
}

Interval no_click_probability(const Chain& chain, const EndAngles& angles, const SilentSet& silent, Precision bits) {
  const Field<Interval> field{bits};
  ModeMatrices modes(chain, bits);
  Interval probability = no_dark_event(field, chain.left_end.detectors, chain.left_end.background, silent.left) *
                         no_dark_event(field, chain.right_end.detectors, chain.right_end.background, silent.right);
  for (std::size_t k = 0; k < chain.station_count(); ++k) {
    modes.add_station(k, silent.stations[k]);
    probability *= no_dark_event(field, chain.stations[k].detectors, chain.stations[k].background, silent.stations[k]);
  }
  modes.add_end(chain.left_end, angles.left_deg, true, silent.left);
  modes.add_end(chain.right_end, angles.right_deg, false, silent.right);
  for (const model::Source& source : chain.sources) {
    probability *= square(enclose(model::Real(1) - source.pair_parameter, bits));
  }
  return probability / determinant(modes.kernel(), bits);
}

Interval plain_pattern_probability(const Chain& chain, const model::Pattern& pattern, Precision bits) {
  std::vector<Masks> places;
  for (const auto& asks : pattern.stations) places.push_back(masks_of(asks));
  places.push_back(masks_of(pattern.left));
  places.push_back(masks_of(pattern.right));
  const EndAngles angles{chain.left_end.analyser_deg, chain.right_end.analyser_deg};

  Interval sum(bits);
  std::vector<unsigned> chosen(places.size());
  for_each_choice(places, 0, chosen, 1, [&](const std::vector<unsigned>& silent, int sign) {
    const SilentSet set{{silent.begin(), silent.end() - 2}, silent[silent.size() - 2], silent.back()};
    sum += no_click_probability(chain, angles, set, bits) * static_cast<long>(sign);
  });
  return sum;
}

}  // namespace heraldgauge::reference
