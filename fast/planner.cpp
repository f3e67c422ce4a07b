#include "fast/planner.hpp"

#include <algorithm>

#include "fast/tail.hpp"

namespace heraldgauge::fast {
namespace {

constexpr int c = 0;
constexpr int d = 1;
constexpr int sum = 2;

std::vector<Term> terms_of(model::Herald herald, const std::array<bool, 2>& alike, bool parity) {
  std::vector<Term> terms;
  const auto add_pair = [&](const Term& first, const Term& second) {
    if (alike[0]) return terms.push_back({first.h, sum, first.minus});
    if (alike[1]) return terms.push_back({sum, first.v, first.minus});
    terms.push_back(first);
    terms.push_back(second);
  };
  if (herald == model::Herald::either && !parity) return {{sum, sum, false}};
  if (herald != model::Herald::psi_minus) add_pair({c, c, false}, {d, d, false});
  if (herald != model::Herald::psi_plus) add_pair({c, d, true}, {d, c, true});
  return terms;
}

bool aligned(const model::Rational& degrees) { return degrees == 0 || degrees == 90; }

class Planner {
 public:
  Planner(const ChainNumbers& numbers, const ExactModes& modes, Planned& planned)
      : numbers_(numbers), modes_(modes), plan_(planned.plan), layout_(planned.layout) {}

  void add_stations(bool diagonal) {
    const auto is = [](model::Herald herald) {
      return [herald](const StationNumbers& s) { return s.herald == herald; };
    };
    const auto& stations = numbers_.stations;
    const bool open = std::any_of(stations.begin(), stations.end(), is(model::Herald::either));
    plan_.parity = diagonal && open && !alike(numbers_.right);
    plan_.odd = std::count_if(stations.begin(), stations.end(), is(model::Herald::psi_minus)) % 2 == 1;
    for (std::size_t k = 0; k < stations.size(); ++k) {
      const StationStructure& structure = modes_.structure[k];
      const bool as_before =
          structure.as_before && plan_.cutoffs[k] == plan_.cutoffs[k - 1] && plan_.cutoffs[k + 1] == plan_.cutoffs[k];
      plan_.stations.push_back({structure.overlap, structure.alike, structure.polarisations_alike, as_before,
                                terms_of(stations[k].herald, structure.alike, plan_.parity)});
    }
  }

  int view(std::vector<EndView>& views, const model::Rational& angle, int outcome, bool sectors) {
    for (std::size_t i = 0; i < views.size(); ++i) {
      if (views[i].angle != angle || views[i].outcome != outcome) continue;
      views[i].sectors = views[i].sectors || sectors;
      return static_cast<int>(i);
    }
    views.push_back({angle, outcome, sectors});
    return static_cast<int>(views.size()) - 1;
  }

  int add_table(const model::Rational& left, const model::Rational& right) {
    const int first = static_cast<int>(plan_.pairings.size());
    const bool sectors = !aligned(left) && !aligned(right);
    for (int l = 0; l < 4; ++l) {
      for (int r = 0; r < 4; ++r) {
        const int to = view(plan_.right, right, r, sectors);
        plan_.pairings.push_back({view(plan_.left, left, l, sectors), to, to});
      }
    }
    return first;
  }

  void add_diagonal() {
    layout_.diagonal = static_cast<int>(plan_.pairings.size());
    const bool mirror = alike(numbers_.left);  // at 45 degrees cross is then plus with V reversed
    for (const int l : {bit_plus, bit_cross}) {
      for (const int r : {bit_plus, bit_cross}) {
        const int opposite = r == bit_plus ? bit_cross : bit_plus;
        plan_.pairings.push_back({view(plan_.left, 45, mirror ? int{bit_plus} : l, true),
                                  view(plan_.right, 45, r, true), view(plan_.right, 45, opposite, true),
                                  mirror && l == bit_cross});
      }
    }
  }

  // Enough samples of phi = 2 * right angle for the largest pair number.
  void add_samples(const model::Rational& left) {
    layout_.even_in_angle = aligned(left);
    layout_.visibility_left = view(plan_.left, left, only_plus, !layout_.even_in_angle);
    layout_.samples = static_cast<int>(plan_.pairings.size());
    const int degree = plan_.cutoffs.back();
    layout_.sample_count = layout_.even_in_angle ? degree + 1 : 2 * degree + 1;
    for (int s = 0; s < layout_.sample_count; ++s) {
      const model::Rational angle =
          layout_.even_in_angle ? model::Rational(90 * s) / degree : model::Rational(180 * s) / layout_.sample_count;
      const int to = view(plan_.right, angle, contrast, !layout_.even_in_angle);
      plan_.pairings.push_back({layout_.visibility_left, to, to});
    }
  }

 private:
  const ChainNumbers& numbers_;
  const ExactModes& modes_;
  Plan& plan_;
  Layout& layout_;
};

// Heuristic weight of n pairs in source k, its neighbours' sources having one pair each.
class SourceWeight {
 public:
  SourceWeight(const ChainNumbers& numbers, const ExactModes& modes, std::size_t k)
      : numbers_(numbers), modes_(modes.modes), k_(k) {}

  double operator()(int n) const {
    const double lam = numbers_.sources[k_].parameter.hi;
    return (n + 1) * std::pow(lam, n) * left(n) * right(n);
  }

 private:
  static double end(const EndMode<DoubleDouble>& mode, int n) {
    return end_bound(std::max(mode.dark[0].hi, mode.dark[1].hi),
                     std::max(mode.registering[0].hi, mode.registering[1].hi), only_plus, n);
  }
  double left(int n) const {
    if (k_ == 0) return end(modes_.left, n);
    const auto& s = modes_.stations[k_ - 1];
    return station_bound(s.dark, s.registering_r, s.registering_l, 1, n, 2);
  }
  double right(int n) const {
    if (k_ == modes_.stations.size()) return end(modes_.right, n);
    const auto& s = modes_.stations[k_];
    return station_bound(s.dark, s.registering_r, s.registering_l, n, 1, 2);
  }

  const ChainNumbers& numbers_;
  const LinkModes<DoubleDouble>& modes_;
  std::size_t k_;
};

constexpr int fewest_pairs = 4;  // what two places can require of one source: see exact zeros in values.cpp

std::optional<int> first_cutoff(const ChainNumbers& numbers, const ExactModes& modes, std::size_t k) {
  if (!numbers.sources[k].squeezed) return 1;
  if (numbers.sources[k].parameter.hi == 0) return fewest_pairs;
  const SourceWeight weight(numbers, modes, k);
  const double lam = numbers.sources[k].parameter.hi;
  const double most = std::max({weight(0), weight(1), weight(2), weight(3)});
  const double wanted = most * 0x1p-55 / static_cast<double>(numbers.sources.size());
  for (int cutoff = fewest_pairs; cutoff <= largest_pairs; ++cutoff) {
    const double ratio = dropped_ratio(lam, cutoff);
    if (ratio < 0.95 && weight(cutoff + 1) / (1 - ratio) <= wanted) return cutoff;
  }
  return std::nullopt;
}

}  // namespace

bool alike(const EndNumbers& end) {
  const auto& [plus, cross] = end.detectors;
  return plus.registering == cross.registering && plus.dark == cross.dark;
}

Needs needs_of(const std::vector<model::Quantity>& quantities) {
  using enum model::QuantityKind;
  Needs needs;
  for (const model::Quantity& quantity : quantities) {
    switch (quantity.kind) {
      case end_pattern:
        needs.analyser = true;
        break;
      case gain:
      case qber_rectilinear:
        needs.rectilinear = true;
        break;
      case qber_diagonal:
        needs.diagonal = true;
        break;
      case key_fraction:
      case key_rate:
        needs.rectilinear = needs.diagonal = true;
        break;
      case visibility:
      case visibility_deficit:
        needs.visibility = true;
        break;
      default:
        break;
    }
  }
  return needs;
}

Planned make_plan(const ChainNumbers& numbers, const ExactModes& modes, const Needs& needs, std::vector<int> cutoffs) {
  Planned planned;
  planned.plan.cutoffs = std::move(cutoffs);
  for (const SourceNumbers& source : numbers.sources) planned.plan.squeezed.push_back(source.squeezed);
  Planner planner(numbers, modes, planned);
  // Without stations only the difference of the angles matters, and both bases are one.
  const bool direct = numbers.stations.empty();
  const model::Rational left = direct ? model::Rational(0) : numbers.left.analyser_deg;
  const model::Rational right =
      direct ? reduced_angle(numbers.right.analyser_deg - numbers.left.analyser_deg) : numbers.right.analyser_deg;
  planner.add_stations(needs.diagonal && !direct);
  planned.layout.rectilinear = planner.add_table(0, 0);
  planned.layout.analyser = planned.layout.rectilinear;
  if (needs.analyser && (left != 0 || right != 0)) planned.layout.analyser = planner.add_table(left, right);
  if (needs.diagonal && !direct) planner.add_diagonal();
  if (needs.visibility) planner.add_samples(left);
  return planned;
}

std::optional<std::vector<int>> first_cutoffs(const ChainNumbers& numbers, const ExactModes& modes) {
  std::vector<int> cutoffs;
  for (std::size_t k = 0; k < numbers.sources.size(); ++k) {
    const std::optional<int> cutoff = first_cutoff(numbers, modes, k);
    if (!cutoff) return std::nullopt;
    cutoffs.push_back(*cutoff);
  }
  return cutoffs;
}

std::optional<std::vector<int>> more_pairs(std::vector<int> cutoffs, const ChainNumbers& numbers) {
  for (std::size_t k = 0; k < cutoffs.size(); ++k) {
    if (!numbers.sources[k].squeezed) continue;
    cutoffs[k] += 2 + cutoffs[k] / 8;
    if (cutoffs[k] > largest_pairs) return std::nullopt;
  }
  return cutoffs;
}

}  // namespace heraldgauge::fast
