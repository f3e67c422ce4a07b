#include "fast/rotation.hpp"

#include <array>
#include <utility>

#include "fast/numbers.hpp"

namespace heraldgauge::fast {
namespace {

const std::array<DoubleDouble, largest_pairs + 2>& square_roots() {
  static const auto table = [] {
    std::array<DoubleDouble, largest_pairs + 2> roots;
    for (std::size_t k = 0; k < roots.size(); ++k) roots[k] = square_root(DoubleDouble(static_cast<double>(k)));
    return roots;
  }();
  return table;
}

DoubleDouble root(int k) { return square_roots()[static_cast<std::size_t>(k)]; }

struct Factors {
  std::vector<std::vector<DoubleDouble>> exact;  // [delta][a], a + delta <= largest_pairs
  std::vector<std::vector<double>> rounded;
};

const Factors& factors() {
  static const Factors table = [] {
    Factors result;
    for (int delta = 0; delta <= largest_pairs; ++delta) {
      std::vector<DoubleDouble> exact;
      std::vector<double> rounded_row;
      for (int a = 0; a + delta <= largest_pairs; ++a) {
        DoubleDouble product = 1;
        for (int k = a + 1; k <= a + delta; ++k) product = product * root(k);
        exact.push_back(product);
        rounded_row.push_back(product.hi);
      }
      result.exact.push_back(std::move(exact));
      result.rounded.push_back(std::move(rounded_row));
    }
    return result;
  }();
  return table;
}

}  // namespace

Rotation::Rotation(const model::Rational& degrees, int largest)
    : largest_(largest), aligned_(degrees == 0 || degrees == 90), balanced_(degrees == 45) {
  const CosineSine angle = cosine_sine(degrees);
  const DoubleDouble c = angle.cosine;
  const DoubleDouble s = angle.sine;
  exact_.resize(position(largest + 1, 0));
  exact_[0] = 1;
  for (int n = 1; n <= largest; ++n) {
    const auto before = [&](int h, int p) {
      const bool inside = h >= 0 && h < n && p >= 0 && p < n;
      return inside ? exact_[position(n - 1, h) + static_cast<std::size_t>(p)] : DoubleDouble(0);
    };
    for (int h = 0; h <= n; ++h) {
      for (int p = 0; p <= n; ++p) {
        const DoubleDouble by_plus = c * root(h) * before(h - 1, p - 1) + s * root(n - h) * before(h, p - 1);
        const DoubleDouble by_cross = c * root(n - h) * before(h, p) - s * root(h) * before(h - 1, p);
        exact_[position(n, h) + static_cast<std::size_t>(p)] =
            (root(p) * by_plus + root(n - p) * by_cross) / DoubleDouble(n);
      }
    }
  }
  rounded_.reserve(exact_.size());
  for (const DoubleDouble& element : exact_) rounded_.push_back(element.hi);
}

std::shared_ptr<const Rotation> rotation(const model::Rational& degrees, int largest) {
  constexpr std::size_t kept = 64;
  thread_local std::vector<std::pair<model::Rational, std::shared_ptr<const Rotation>>> known;
  thread_local std::size_t next = 0;
  for (auto& [angle, table] : known) {
    if (angle != degrees) continue;
    if (table->largest() < largest) table = std::make_shared<const Rotation>(degrees, largest);
    return table;
  }
  auto table = std::make_shared<const Rotation>(degrees, largest);
  if (known.size() < kept) {
    known.emplace_back(degrees, table);
  } else {
    known[next++ % kept] = {degrees, table};
  }
  return table;
}

const double* raising_factors(double, int delta) { return factors().rounded[static_cast<std::size_t>(delta)].data(); }
const DoubleDouble* raising_factors(DoubleDouble, int delta) {
  return factors().exact[static_cast<std::size_t>(delta)].data();
}

}  // namespace heraldgauge::fast
