#include "reference/model/quantity.hpp"

namespace heraldgauge::model {
namespace {

constexpr std::string_view end_pattern_prefix = "end_pattern_";
constexpr int end_pattern_count = 16;

std::string bits(int outcome) {
  std::string text;
  for (int bit = 3; bit >= 0; --bit) text += (outcome >> bit & 1) != 0 ? '1' : '0';
  return text;
}

}  // namespace

const std::vector<QuantityEntry>& quantity_registry() {
  using enum QuantityKind;
  static const std::vector<QuantityEntry> registry = {
      {herald_probability, "herald_probability",
       "Probability per trial that every station announces an accepted outcome.", Sense::more_is_better, false},
      {pattern_probability, "pattern_probability",
       "Probability per trial of the one click pattern stated in ask.pattern.", Sense::neutral, false},
      {trials_per_herald, "trials_per_herald", "Mean number of trials until a herald: 1 / herald_probability.",
       Sense::less_is_better, false},
      {end_pattern, "end_pattern_abcd",
       "Given the herald, probability of the clicks left plus, left cross, right plus, right cross (1 or 0 each).",
       Sense::neutral, false},
      {gain, "gain", "Given the herald, probability of at least one click at each end, analysers at 0 degrees.",
       Sense::more_is_better, false},
      {qber_rectilinear, "qber_rectilinear",
       "Erroneous share of the events with a click at each end, both analysers at 0 degrees.", Sense::less_is_better,
       false},
      {qber_diagonal, "qber_diagonal",
       "Erroneous share of the events with a click at each end, both analysers at 45 degrees.", Sense::less_is_better,
       false},
      {visibility, "visibility",
       "(max - min)/(max + min), over the right analyser angle, of the plus-plus coincidence with both cross silent.",
       Sense::more_is_better, true},
      {visibility_deficit, "visibility_deficit", "1 - visibility, computed as 2 min/(max + min).",
       Sense::less_is_better, true},
      {key_fraction, "key_fraction",
       "Asymptotic secret bits per herald: gain * sifting * max(0, 1 - f h2(qber_rectilinear) - h2(qber_diagonal)).",
       Sense::more_is_better, true},
      {key_rate, "key_rate", "Asymptotic secret bits per trial: key_fraction * herald_probability.",
       Sense::more_is_better, true},
      {capacity_point, "capacity_point",
       "Bits per mode of one direct lossy channel: -log2(1 - product of all arm transmittances).", Sense::neutral,
       true},
      {capacity_loose, "capacity_loose",
       "An earlier, larger bound for that channel: log2((1+eta)/(1-eta)), bits per mode.", Sense::neutral, true},
      {capacity_chain, "capacity_chain",
       "Bits per mode with stations as repeaters: -log2(1 - eta), eta the two arms of the worst source.",
       Sense::neutral, true},
      {capacity_arm, "capacity_arm",
       "Bits per mode through the worst single arm: -log2(1 - t); twice this bounds every key rate per trial.",
       Sense::neutral, true},
  };
  return registry;
}

const QuantityEntry& entry_of(const Quantity& quantity) {
  return quantity_registry()[static_cast<std::size_t>(quantity.kind)];
}

std::string name_of(const Quantity& quantity) {
  if (quantity.kind == QuantityKind::end_pattern) return std::string(end_pattern_prefix) + bits(quantity.outcome);
  return std::string(entry_of(quantity).name);
}

std::vector<Quantity> all_quantities(bool with_pattern) {
  std::vector<Quantity> quantities;
  for (const QuantityEntry& entry : quantity_registry()) {
    if (entry.kind == QuantityKind::pattern_probability && !with_pattern) continue;
    const int outcomes = entry.kind == QuantityKind::end_pattern ? end_pattern_count : 1;
    for (int outcome = 0; outcome < outcomes; ++outcome) quantities.push_back({entry.kind, outcome});
  }
  return quantities;
}

std::optional<Quantity> find_quantity(std::string_view name) {
  for (const Quantity& quantity : all_quantities(true)) {
    if (name_of(quantity) == name) return quantity;
  }
  return std::nullopt;
}

}  // namespace heraldgauge::model
