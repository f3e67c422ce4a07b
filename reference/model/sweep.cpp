#include "reference/model/reading/geometric.hpp"
#include "reference/model/scenario.hpp"

namespace heraldgauge::model {

std::uint64_t Sweep::size() const { return spacing == Spacing::listed ? values.size() : points; }

Value Sweep::value(std::uint64_t index) const {
  switch (spacing) {
    case Spacing::listed:
      break;
    case Spacing::linear:
      return Rational(from + (to - from) * Rational(index) / Rational(points - 1));
    case Spacing::logarithmic:
      return reading::geometric_point(from, to, index, points);
  }
  return values[index];
}

std::uint64_t Scenario::point_count() const {
  std::uint64_t product = 1;
  for (const Sweep& sweep : sweeps) product *= sweep.size();
  return product;
}

std::vector<std::pair<std::string, Value>> Scenario::parameters_at(std::uint64_t index) const {
  std::vector<std::pair<std::string, Value>> parameters(sweeps.size());
  for (std::size_t place = sweeps.size(); place-- > 0;) {
    const Sweep& sweep = sweeps[place];
    parameters[place] = {sweep.key, sweep.value(index % sweep.size())};
    index /= sweep.size();
  }
  return parameters;
}

std::string value_text(const Value& value) {
  if (const auto* number = std::get_if<Rational>(&value)) return exact_text(*number);
  if (const auto* text = std::get_if<std::string>(&value)) return *text;
  std::string list;
  for (const std::string& text : std::get<std::vector<std::string>>(value)) list += (list.empty() ? "" : ",") + text;
  return list;
}

}  // namespace heraldgauge::model
