#include "fast/evaluate.hpp"

#include <oneapi/tbb/parallel_for.h>
#include <oneapi/tbb/task_arena.h>

#include <algorithm>

#include "fast/capacity.hpp"
#include "fast/pattern_value.hpp"
#include "fast/quantities.hpp"

namespace heraldgauge::fast {
namespace {

using model::Quantity;
using model::QuantityKind;

constexpr double tail_allowed = 2e-13;
// A value whose bound is beyond this is done again in double-double; long chains may take more round-off. The bounds
// count every rounding at its worst: true errors are some hundred times smaller.
constexpr std::size_t short_chain = 20;
constexpr double bound_allowed(std::size_t stations) { return stations <= short_chain ? 1e-11 : 9e-11; }
// Beyond this even then, a value is not given.
constexpr double bound_served = 1e-9;

// A point with everything that does not change between attempts.
struct Point {
  const model::Chain* chain = nullptr;
  ChainNumbers numbers;
  ExactModes modes;
  std::vector<int> cutoffs;
  std::string refusal;
};

Point prepare(const model::Chain& chain) {
  Point point;
  point.chain = &chain;
  auto numbers = numbers_of(chain);
  if (const auto* reason = std::get_if<std::string>(&numbers)) {
    point.refusal = *reason;
    return point;
  }
  point.numbers = std::get<ChainNumbers>(std::move(numbers));
  point.modes = modes_of(point.numbers);
  if (point.modes.smallest_complement < 1e-13) {
    point.refusal = "an efficiency times transmittance (or source.pair_parameter) is closer to 1 than 1e-13 and not 1";
    return point;
  }
  if (const auto cutoffs = first_cutoffs(point.numbers, point.modes)) {
    point.cutoffs = *cutoffs;
  } else {
    point.refusal = "source.pair_parameter needs more than " + std::to_string(largest_pairs) + " pairs a source";
  }
  return point;
}

// True where make_plan gives both points the same plan: it looks at nothing else.
bool same_plan(const Point& a, const Point& b) {
  const auto same_source = [](const SourceNumbers& x, const SourceNumbers& y) { return x.squeezed == y.squeezed; };
  const auto same_herald = [](const StationNumbers& x, const StationNumbers& y) { return x.herald == y.herald; };
  const auto same_end = [](const EndNumbers& x, const EndNumbers& y) {
    return x.analyser_deg == y.analyser_deg && alike(x) == alike(y);
  };
  return a.cutoffs == b.cutoffs && a.modes.structure == b.modes.structure &&
         std::ranges::equal(a.numbers.sources, b.numbers.sources, same_source) &&
         std::ranges::equal(a.numbers.stations, b.numbers.stations, same_herald) &&
         same_end(a.numbers.left, b.numbers.left) && same_end(a.numbers.right, b.numbers.right);
}

// One operation, and what a complement 1 - x formed in double-double may have lost.
template <class T>
double unit_of(const Point& point) {
  return Precision<T>::unit + 0x1p-102 / point.modes.smallest_complement;
}

// Returns the largest part that the cut-offs may have left out of any value.
template <class T>
double attempt(const Point& point, const Planned& planned, const std::vector<Quantity>& quantities,
               std::span<Value> values) {
  const LinkModes<T> modes = rounded_modes<T>({&point.modes.modes});
  const KernelResult<T> result = run_kernel(planned.plan, modes);
  return form_values(*point.chain, sums_of(result, planned, modes.right, unit_of<T>(point)), quantities, values);
}

// The values by T, again with more pairs as long as the cut-offs leave out too much.
template <class T>
void evaluate_with_more_pairs(double tail_share, Point& point, const std::vector<Quantity>& quantities,
                              std::span<Value> values) {
  const Needs needs = needs_of(quantities);
  for (int i = 0; i < most_attempts && tail_share > tail_allowed; ++i) {
    const auto cutoffs = more_pairs(point.cutoffs, point.numbers);
    if (!cutoffs) break;
    point.cutoffs = *cutoffs;
    tail_share = attempt<T>(point, make_plan(point.numbers, point.modes, needs, point.cutoffs), quantities, values);
  }
}

// In double-double, those alone whose bound asks for it.
void evaluate_precisely(Point& point, const std::vector<Quantity>& quantities, std::span<Value> values) {
  const double allowed = bound_allowed(point.numbers.stations.size());
  std::vector<std::size_t> where;
  std::vector<Quantity> again;
  for (std::size_t i = 0; i < values.size(); ++i) {
    if (values[i].relative_error_bound <= allowed) continue;
    where.push_back(i);
    again.push_back(quantities[i]);
  }
  if (again.empty()) return;
  std::vector<Value> better(again.size());
  const Planned planned = make_plan(point.numbers, point.modes, needs_of(again), point.cutoffs);
  evaluate_with_more_pairs<DoubleDouble>(attempt<DoubleDouble>(point, planned, again, better), point, again, better);
  for (std::size_t i = 0; i < where.size(); ++i) values[where[i]] = better[i];
}

void give_pattern(const Point& point, const model::Pattern& pattern, std::span<Value> values) {
  for (Value& value : values) {
    if (value.quantity.kind != QuantityKind::pattern_probability) continue;
    value =
        pattern_value(point.numbers, point.modes, point.cutoffs, pattern, unit_of<DoubleDouble>(point), tail_allowed);
  }
}

// Takes more pairs, then double-double, until the bounds are met or nothing more can be done.
void improve(double tail_share, Point& point, const std::vector<Quantity>& quantities,
             const std::optional<model::Pattern>& pattern, std::span<Value> values) {
  evaluate_with_more_pairs<double>(tail_share, point, quantities, values);
  evaluate_precisely(point, quantities, values);
  if (pattern) give_pattern(point, *pattern, values);
  for (Value& value : values) {
    if (value.status != Status::computed || value.relative_error_bound < bound_served) continue;
    value = {value.quantity, Status::declined, "its terms cancel below the precision of double-double", {}, 0};
  }
}

void decline(const model::Chain& chain, const std::vector<Quantity>& quantities, const std::string& reason,
             std::span<Value> values) {
  const Bottlenecks bottlenecks = bottlenecks_of(chain);
  for (std::size_t i = 0; i < quantities.size(); ++i) {
    values[i] = is_capacity(quantities[i].kind) ? capacity(bottlenecks, quantities[i])
                                                : Value{quantities[i], Status::declined, reason, {}, 0};
  }
}

// The points of one block: those whose plans are equal go through the kernel a batch of lanes at a time, and every
// lane's bytes are those of the point alone.
class Block {
 public:
  // answers: one value a quantity, chain by chain.
  Block(std::span<const model::Chain> chains, const std::vector<Quantity>& quantities,
        const std::optional<model::Pattern>& pattern, std::span<Value> answers)
      : quantities_(quantities), pattern_(pattern), needs_(needs_of(quantities)), answers_(answers) {
    points_.reserve(chains.size());
    for (const model::Chain& chain : chains) points_.push_back(prepare(chain));
  }

  void run() {
    for (std::size_t i = 0; i < points_.size(); ++i) {
      if (!points_[i].refusal.empty()) {
        decline(*points_[i].chain, quantities_, points_[i].refusal, values_of(i));
        continue;
      }
      enter(i);
    }
    for (const Group& group : groups_) run_group(group);
  }

 private:
  struct Group {
    Planned planned;
    std::vector<std::size_t> members;
  };

  // Looks back at the latest groups only: sweeps change slowly, and random chains hardly ever agree.
  void enter(std::size_t index) {
    constexpr std::size_t looked_at = 8;
    const Point& point = points_[index];
    const std::size_t first = groups_.size() > looked_at ? groups_.size() - looked_at : 0;
    for (std::size_t g = groups_.size(); g > first; --g) {
      if (!same_plan(points_[groups_[g - 1].members.front()], point)) continue;
      groups_[g - 1].members.push_back(index);
      return;
    }
    groups_.push_back({make_plan(point.numbers, point.modes, needs_, point.cutoffs), {index}});
  }

  void run_group(const Group& group) {
    std::size_t i = 0;
    for (; i + lanes <= group.members.size(); i += lanes) run_lanes(group, i);
    for (; i < group.members.size(); ++i) {
      const std::size_t index = group.members[i];
      improve_further(index, attempt<double>(points_[index], group.planned, quantities_, values_of(index)));
    }
  }

  void run_lanes(const Group& group, std::size_t first) {
    std::vector<const LinkModes<DoubleDouble>*> modes;
    for (std::size_t i = 0; i < lanes; ++i) modes.push_back(&points_[group.members[first + i]].modes.modes);
    const KernelResult<Lanes<batch_width>> results =
        run_kernel(group.planned.plan, rounded_modes<Lanes<batch_width>>(modes));
    for (std::size_t i = 0; i < lanes; ++i) {
      const std::size_t index = group.members[first + i];
      const EndMode<double> right = rounded_end(modes[i]->right);
      const Sums sums =
          sums_of(lane_result(results, static_cast<int>(i)), group.planned, right, unit_of<double>(points_[index]));
      improve_further(index, form_values(*points_[index].chain, sums, quantities_, values_of(index)));
    }
  }

  void improve_further(std::size_t index, double tail_share) {
    improve(tail_share, points_[index], quantities_, pattern_, values_of(index));
  }

  std::span<Value> values_of(std::size_t index) const {
    return answers_.subspan(index * quantities_.size(), quantities_.size());
  }

  static constexpr std::size_t lanes = batch_width;
  const std::vector<Quantity>& quantities_;
  const std::optional<model::Pattern>& pattern_;
  Needs needs_;
  std::span<Value> answers_;
  Buffer<Point> points_;
  std::vector<Group> groups_;
};

constexpr std::size_t block_size = 64;

}  // namespace

std::vector<Value> evaluate(const model::Chain& chain, const std::vector<Quantity>& quantities,
                            const std::optional<model::Pattern>& pattern) {
  std::vector<Value> answer(quantities.size());
  Block(std::span(&chain, 1), quantities, pattern, answer).run();
  return answer;
}

void evaluate_all(std::span<const model::Chain> chains, const std::vector<Quantity>& quantities,
                  const std::optional<model::Pattern>& pattern, unsigned threads, std::vector<Value>& answers) {
  answers.resize(chains.size() * quantities.size());
  const std::size_t blocks = (chains.size() + block_size - 1) / block_size;
  const auto run_block = [&](std::size_t block) {
    const std::size_t first = block * block_size;
    const std::size_t count = std::min(block_size, chains.size() - first);
    Block(chains.subspan(first, count), quantities, pattern,
          std::span(answers).subspan(first * quantities.size(), count * quantities.size()))
        .run();
  };
  tbb::task_arena arena(threads == 0 ? tbb::task_arena::automatic : static_cast<int>(threads));
  arena.execute([&] { tbb::parallel_for(std::size_t{0}, blocks, run_block); });
}

}  // namespace heraldgauge::fast
