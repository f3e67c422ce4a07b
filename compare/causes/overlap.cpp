#include "compare/causes/overlap.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

namespace heraldgauge::compare {
namespace {

struct Known {
  double value;
  const char* text;
};

// Factors by which figures of this trade are confused.
const std::array<Known, 12> known_factors = {{{2, "2"},
                                              {0.5, "1/2"},
                                              {4, "4"},
                                              {0.25, "1/4"},
                                              {std::numbers::ln2, "ln 2"},
                                              {1 / std::numbers::ln2, "1/ln 2"},
                                              {std::numbers::ln10 / 10, "ln(10)/10"},
                                              {10 / std::numbers::ln10, "10/ln(10)"},
                                              {1.609344, "1.609344 (kilometres a mile)"},
                                              {1 / 1.609344, "1/1.609344 (miles a kilometre)"},
                                              {std::numbers::pi, "pi"},
                                              {1 / std::numbers::pi, "1/pi"}}};

constexpr int most_digits_written = 17;

}  // namespace

std::optional<Overlap> largest_overlap(const std::vector<Span>& spans) {
  struct Edge {
    double at;
    bool opens;
  };
  std::vector<Edge> edges;
  for (const Span& span : spans) {
    if (!(span.lower <= span.upper) || !std::isfinite(span.lower) || !std::isfinite(span.upper)) continue;
    edges.push_back({span.lower, true});
    edges.push_back({span.upper, false});
  }
  std::sort(edges.begin(), edges.end(),
            [](const Edge& a, const Edge& b) { return a.at != b.at ? a.at < b.at : a.opens && !b.opens; });
  std::size_t open = 0;
  std::optional<Overlap> best;
  for (std::size_t i = 0; i < edges.size(); ++i) {
    if (!edges[i].opens) {
      --open;
    } else if (++open; !best || open > best->count) {
      best = Overlap{{edges[i].at, edges[i + 1].at}, open};
    }
  }
  return best;
}

ShortNumber shortest_in(const Span& span, Meaning meaning) {
  const auto inside = [&](double x) { return span.lower <= x && x <= span.upper; };
  const double middle = span.lower + (span.upper - span.lower) / 2;
  const double power = std::pow(10.0, std::round(std::log10(std::abs(middle))));
  if (inside(power)) return {power, fmt::format("{:g}", power)};
  for (const Known& known : known_factors) {
    if (meaning == Meaning::factor && inside(known.value)) return {known.value, known.text};
  }
  for (int digits = 1; digits < most_digits_written; ++digits) {
    const std::string text = fmt::format("{:.{}g}", middle, digits);
    const double value = std::strtod(text.c_str(), nullptr);
    if (inside(value)) return {value, text};
  }
  return {middle, fmt::format("{:.17g}", middle)};
}

}  // namespace heraldgauge::compare
