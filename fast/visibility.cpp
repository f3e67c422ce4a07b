#include "fast/visibility.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "fast/contraction.hpp"
#include "fast/numbers.hpp"

namespace heraldgauge::fast {
namespace {

constexpr double pi = std::numbers::pi;

struct Slopes {
  double value = 0;
  double first = 0;
  double second = 0;
};

Slopes slopes_at(const Harmonics& f, double phi) {
  Slopes s;
  for (std::size_t q = 1; q < f.cosine.size(); ++q) {
    const double k = static_cast<double>(q);
    const double c = std::cos(k * phi);
    const double d = std::sin(k * phi);
    s.value += f.cosine[q] * c + f.sine[q] * d;
    s.first += k * (f.sine[q] * c - f.cosine[q] * d);
    s.second -= k * k * (f.cosine[q] * c + f.sine[q] * d);
  }
  return s;
}

// Newton from a point next to a maximum of sign * f; stays put where it would leave the neighbourhood.
double polished(const Harmonics& f, double phi, double reach) {
  const double start = phi;
  for (int i = 0; i < 20; ++i) {
    const Slopes s = slopes_at(f, phi);
    if (s.second == 0) break;
    const double step = -s.first / s.second;
    if (std::fabs(phi + step - start) > reach) break;
    phi += step;
    if (std::fabs(step) < 1e-16) break;
  }
  return phi;
}

// The place of the largest value of sign * f among the polished local maxima of a grid.
double best_place(const Harmonics& f, double sign, std::size_t grid) {
  std::vector<double> values(grid);
  const double step = 2 * pi / static_cast<double>(grid);
  for (std::size_t i = 0; i < grid; ++i) values[i] = sign * slopes_at(f, step * static_cast<double>(i)).value;
  double best = 0;
  double best_value = -INFINITY;
  for (std::size_t i = 0; i < grid; ++i) {
    if (values[i] < values[(i + 1) % grid] || values[i] < values[(i + grid - 1) % grid]) continue;
    const double start = step * static_cast<double>(i);
    for (const double phi : {polished(f, start, step), start}) {
      const double value = sign * slopes_at(f, phi).value;
      if (value > best_value) {
        best = phi;
        best_value = value;
      }
    }
  }
  return best;
}

double size_of(const Harmonics& f, std::size_t q) {
  return f.sine[q] == 0 ? std::fabs(f.cosine[q]) : std::hypot(f.cosine[q], f.sine[q]);
}

// Bound on the second derivative of the harmonics from a given one on.
double curvature(const Harmonics& f, std::size_t from) {
  double sum = 0;
  for (std::size_t q = from; q < f.cosine.size(); ++q) sum += static_cast<double>(q * q) * size_of(f, q);
  return sum;
}

double loss_at(const Harmonics& f, double phi, double noise) {
  const Slopes s = slopes_at(f, phi);
  const double k = static_cast<double>(f.cosine.size());
  const double slope = std::fabs(s.first) + k * k * noise + 0x1p-52 * curvature(f, 1);
  return s.second == 0 ? slope * pi : slope * slope / std::fabs(s.second);
}

// P and its contrast at one angle, exact in the angle given.
template <class T>
struct Contracted {
  PairedSum<T> full;
  PairedSum<T> contrast_part;
};

template <class T>
Contracted<T> contracted(const VisibilityInput<T>& input, double phi) {
  for (const std::size_t i : {0, 1}) {
    if (phi == (i == 0 ? 0 : pi) && input.full[i] != nullptr) return {*input.full[i], *input.contrast_part[i]};
  }
  constexpr double degrees_per_radian = 180 / pi;
  const model::Rational degrees(phi == pi ? 90.0 : phi / 2 * degrees_per_radian);
  const auto table = rotation(reduced_angle(degrees), input.vector->cutoff());
  const EndTables<T> tables(*input.right, input.vector->cutoff());
  Contracted<T> result;
  const auto contract = [&](int outcome, PairedSum<T>& sum) {
    const Sectors<T>& vector = *input.vector;
    const Sectors<T> elements = right_elements(tables, *table, outcome, vector.cutoff(), vector.deltas());
    Contraction<T>().add(vector, elements, false, sum);
  };
  contract(only_plus, result.full);
  contract(contrast, result.contrast_part);
  return result;
}

double as_double(double x) { return x; }
double as_double(const DoubleDouble& x) { return x.hi; }

}  // namespace

Circle::Circle(int period) {
  for (int k = 0; k < period; ++k) {
    const double phi = 2 * pi * k / period;
    cosine.push_back(std::cos(phi));
    sine.push_back(std::sin(phi));
  }
}

Harmonics harmonics_of(const std::vector<double>& samples, bool even, const Circle& circle) {
  const std::size_t count = samples.size();
  const std::size_t degree = even ? count - 1 : (count - 1) / 2;
  const std::size_t period = circle.cosine.size();
  Harmonics f{std::vector<double>(degree + 1, 0.0), std::vector<double>(degree + 1, 0.0)};
  const double unit_weight = 2.0 / static_cast<double>(period);
  for (std::size_t q = 1; q <= degree; ++q) {
    for (std::size_t s = 0, at = 0; s < count; ++s) {
      const bool edge = even && (s == 0 || s == count - 1);
      const double weighted = (even && !edge ? 2 * unit_weight : unit_weight) * samples[s];
      f.cosine[q] += weighted * circle.cosine[at];
      if (!even) f.sine[q] += weighted * circle.sine[at];
      at += q;
      if (at >= period) at -= period;
    }
    if (even && q == degree) f.cosine[q] /= 2;
  }
  return f;
}

Extremes extremes_of(const Harmonics& f, bool even, double noise) {
  // sum q >= 2 of q^2 a_q < a_1 in an even function: f' / sin(phi) has one sign, so 0 and pi are the extremes.
  const double first = size_of(f, 1);
  const double k = static_cast<double>(f.cosine.size());
  if (even && curvature(f, 2) + k * k * k * noise < first) {
    const bool at_zero = f.cosine[1] > 0;
    return {at_zero ? 0 : pi, at_zero ? pi : 0, 0, 0};
  }
  const std::size_t grid = std::max<std::size_t>(64, 16 * f.cosine.size());
  const auto place = [&](double sign) {
    double phi = best_place(f, sign, grid);
    if (even && std::fabs(std::sin(phi)) < 1e-7) phi = std::cos(phi) > 0 ? 0 : pi;
    return phi;
  };
  const double top = place(1);
  const double bottom = place(-1);
  const auto loss = [&](double phi) { return even && (phi == 0 || phi == pi) ? 0 : loss_at(f, phi, noise); };
  return {top, bottom, loss(top), loss(bottom)};
}

template <class T>
Visibility visibility_of(const VisibilityInput<T>& input) {
  const Harmonics f = harmonics_of(input.samples, input.even, *input.circle);
  const Extremes at = extremes_of(f, input.even, input.sample_error);
  const Contracted<T> top = contracted(input, at.maximum_phi);
  const Contracted<T> bottom = contracted(input, at.minimum_phi);
  const double round_off = input.count * input.unit;
  const auto amount = [&](const T& value, double magnitude, double loss) {
    const double x = as_double(value);
    if (magnitude == 0) return Amount{x, loss, 0};
    return Amount{x, round_off * magnitude + loss + half_ulp * std::fabs(x), input.tail};
  };
  const Amount most = amount(top.full.value, top.full.magnitude, at.maximum_loss);
  const Amount least = amount(bottom.full.value, bottom.full.magnitude, at.minimum_loss);
  const Amount difference =
      amount(top.contrast_part.value - bottom.contrast_part.value,
             top.contrast_part.magnitude + bottom.contrast_part.magnitude, at.maximum_loss + at.minimum_loss);
  Visibility result;
  const Amount both = most + least;
  if (both.is_zero()) return result;

  result.defined = true;
  result.visibility = ratio(difference, both);
  result.deficit = ratio(2 * least, both);
  return result;
}

template Visibility visibility_of(const VisibilityInput<double>&);
template Visibility visibility_of(const VisibilityInput<DoubleDouble>&);

}  // namespace heraldgauge::fast
