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

Demand demand_of(const model::Ask& ask) {
  if (ask.kind == model::Ask::Kind::not_looked_at) return Demand::anything;
  return ask.kind == model::Ask::Kind::silent ? Demand::silent : Demand::clicks;
}

// Without stations only the difference of the angles matters.
std::pair<model::Rational, model::Rational> analyser_angles(const ChainNumbers& numbers) {
  if (!numbers.stations.empty()) return {numbers.left.analyser_deg, numbers.right.analyser_deg};
  return {0, reduced_angle(numbers.right.analyser_deg - numbers.left.analyser_deg)};
}

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
    plan_.polarisations_alike = std::all_of(modes_.structure.begin(), modes_.structure.end(),
                                            [](const StationStructure& s) { return s.polarisations_alike; });
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
    views.push_back({angle, outcome, sectors, symmetric(angle, outcome)});
    return static_cast<int>(views.size()) - 1;
  }

  int add_table(const model::Rational& left, const model::Rational& right) {
    const int first = static_cast<int>(plan_.pairings.size());
    const bool sectors = !aligned(left) && !aligned(right);
    for (int l = 0; l < 4; ++l) {
      const bool transposed = l == only_cross && aligned(left) && polarisations_exchangeable();
      const int from = view(plan_.left, left, transposed ? int{only_plus} : l, sectors);
      for (int r = 0; r < 4; ++r) {
        const int to = view(plan_.right, right, r, sectors);
        plan_.pairings.push_back({from, to, to, false, transposed});
      }
    }
    return first;
  }

  // The outcomes at 0 degrees together; the rectilinear table has made their views.
  void add_herald() {
    for (const int outcome : {silent_both, only_plus, both_click}) {
      const bool twice = outcome == only_plus && polarisations_exchangeable();
      plan_.herald.push_back({view(plan_.left, 0, outcome, false), twice ? 2.0 : 1.0});
    }
    if (!polarisations_exchangeable()) plan_.herald.push_back({view(plan_.left, 0, only_cross, false), 1.0});
  }

  void add_diagonal() {
    layout_.diagonal = static_cast<int>(plan_.pairings.size());
    // With alike detectors cross at 45 degrees is plus with V reversed.
    const bool mirror_left = alike(numbers_.left);
    const bool mirror_right = alike(numbers_.right);
    for (const int l : {bit_plus, bit_cross}) {
      const int left = view(plan_.left, 45, mirror_left ? int{bit_plus} : l, true);
      for (const int r : {bit_plus, bit_cross}) {
        const int opposite = r == bit_plus ? bit_cross : bit_plus;
        const bool mirrored = (mirror_left && l == bit_cross) != (mirror_right && r == bit_cross);
        plan_.pairings.push_back({left, view(plan_.right, 45, mirror_right ? int{bit_plus} : r, true),
                                  view(plan_.right, 45, mirror_right ? int{bit_plus} : opposite, true), mirrored});
      }
    }
  }

  // Enough samples of phi = 2 * right angle for the largest pair number.
  void add_samples(const model::Rational& left) {
    layout_.even_in_angle = aligned(left);
    plan_.final_view = view(plan_.left, left, only_plus, !layout_.even_in_angle);
    layout_.samples = static_cast<int>(plan_.pairings.size());
    const int degree = plan_.cutoffs.back();
    layout_.sample_count = layout_.even_in_angle ? degree + 1 : 2 * degree + 1;
    layout_.circle.emplace(layout_.even_in_angle ? 2 * degree : layout_.sample_count);
    for (int s = 0; s < layout_.sample_count; ++s) {
      if (layout_.even_in_angle) {
        add_even_sample(contrast, s, degree);
      } else {
        const int to = view(plan_.right, model::Rational(180 * s) / layout_.sample_count, contrast, true);
        plan_.pairings.push_back({plan_.final_view, to, to});
      }
    }
    if (!layout_.even_in_angle) return;
    layout_.aligned_plus = static_cast<int>(plan_.pairings.size());
    add_even_sample(only_plus, 0, degree);
    add_even_sample(only_plus, degree, degree);
  }

  // At the right angle 90 s / degree, taken as its complement with H and V exchanged where that is the smaller one.
  void add_even_sample(int outcome, int s, int degree) {
    const bool transposed = 2 * s > degree;
    const model::Rational angle = model::Rational(90 * (transposed ? degree - s : s)) / degree;
    const int to = view(plan_.right, angle, outcome, false);
    plan_.pairings.push_back({plan_.final_view, to, to, false, transposed});
  }

 private:
  // Exchanging H and V before the right end changes nothing but the two detectors of the left end.
  bool polarisations_exchangeable() const { return alike(numbers_.left) && plan_.polarisations_alike; }

  // At 45 degrees the exchange only reverses cross.
  bool symmetric(const model::Rational& angle, int outcome) const {
    if (angle == 45) return plan_.polarisations_alike;
    return aligned(angle) && (outcome == silent_both || outcome == both_click) && polarisations_exchangeable();
  }

  const ChainNumbers& numbers_;
  const ExactModes& modes_;
  Plan& plan_;
  Layout& layout_;
};

constexpr double tail_aimed_at = 0x1p-55;  // by a rough estimate; the kernel's bound decides

// Heuristic weight of n pairs in source k, its neighbours' sources having one pair each; two where nothing can be heard
// with one, and a place that hears nothing at all does not count.
class SourceWeight {
 public:
  SourceWeight(const ExactModes& modes, std::size_t k) : modes_(modes.modes), k_(k) {
    while (left(most_looked_at) == 0 && left_pairs_ > 0) left_pairs_ = next(left_pairs_);
    while (right(most_looked_at) == 0 && right_pairs_ > 0) right_pairs_ = next(right_pairs_);
  }

  // Without the factor lam^n.
  double operator()(int n) const { return (n + 1) * left(n) * right(n); }

  static constexpr int most_looked_at = 3;

 private:
  static int next(int pairs) { return pairs == 1 ? 2 : 0; }
  static double end(const EndMode<DoubleDouble>& mode, int n) {
    return end_bound(std::max(mode.dark[0].hi, mode.dark[1].hi),
                     std::max(mode.registering[0].hi, mode.registering[1].hi), only_plus, n);
  }
  double left(int n) const {
    if (left_pairs_ == 0) return 1;
    if (k_ == 0) return end(modes_.left, n);
    const auto& s = modes_.stations[k_ - 1];
    return station_bound(s.dark, s.registering_r, s.registering_l, left_pairs_, n, 2);
  }
  double right(int n) const {
    if (right_pairs_ == 0) return 1;
    if (k_ == modes_.stations.size()) return end(modes_.right, n);
    const auto& s = modes_.stations[k_];
    return station_bound(s.dark, s.registering_r, s.registering_l, n, right_pairs_, 2);
  }

  const LinkModes<DoubleDouble>& modes_;
  std::size_t k_;
  int left_pairs_ = 1;
  int right_pairs_ = 1;
};

constexpr int fewest_pairs = 4;  // what two places can require of one source: see exact zeros in values.cpp

std::optional<int> first_cutoff(const ChainNumbers& numbers, const ExactModes& modes, std::size_t k) {
  if (!numbers.sources[k].squeezed) return 1;
  if (numbers.sources[k].parameter.hi == 0) return fewest_pairs;
  const SourceWeight weight(modes, k);
  const double lam = numbers.sources[k].parameter.hi;
  double most = 0;
  for (int n = SourceWeight::most_looked_at; n >= 0; --n) most = std::max(lam * most, weight(n));
  const double wanted = most * tail_aimed_at / static_cast<double>(numbers.sources.size());
  double power = std::pow(lam, fewest_pairs);
  for (int cutoff = fewest_pairs; cutoff <= largest_pairs; ++cutoff) {
    power *= lam;
    const double ratio = dropped_ratio(lam, cutoff);
    if (ratio < 0.95 && power * weight(cutoff + 1) / (1 - ratio) <= wanted) return cutoff;
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
  const bool direct = numbers.stations.empty();  // both bases are one
  const auto [left, right] = analyser_angles(numbers);
  planner.add_stations(needs.diagonal && !direct);
  planned.layout.rectilinear = planner.add_table(0, 0);
  planner.add_herald();
  planned.layout.analyser = planned.layout.rectilinear;
  if (needs.analyser && (left != 0 || right != 0)) planned.layout.analyser = planner.add_table(left, right);
  if (needs.diagonal && !direct) planner.add_diagonal();
  if (needs.visibility) planner.add_samples(left);
  return planned;
}

Plan make_pattern_plan(const ChainNumbers& numbers, const ExactModes& modes, const model::Pattern& pattern,
                       std::vector<int> cutoffs) {
  Plan plan;
  plan.cutoffs = std::move(cutoffs);
  for (const SourceNumbers& source : numbers.sources) plan.squeezed.push_back(source.squeezed);
  for (std::size_t k = 0; k < numbers.stations.size(); ++k) {
    const auto& asks = pattern.stations[k];
    StationPlan station{modes.structure[k].overlap, {false, false}, false, false, {{0, 0, false}}};
    station.free = true;
    for (std::size_t p = 0; p < 2; ++p) station.demands[p] = {demand_of(asks[p]), demand_of(asks[p + 2])};
    plan.stations.push_back(std::move(station));
  }
  const auto [left, right] = analyser_angles(numbers);
  const bool sectors = !aligned(left) && !aligned(right);
  const auto end = [](const std::array<model::Ask, 2>& asks) {
    return free_end(demand_of(asks[0]), demand_of(asks[1]));
  };
  plan.left.push_back({left, end(pattern.left), sectors, false});
  plan.right.push_back({right, end(pattern.right), sectors, false});
  plan.pairings.push_back({0, 0, 0});
  plan.herald.push_back({0, 1.0});  // scales the vector
  return plan;
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
