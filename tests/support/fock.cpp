#include "tests/support/fock.hpp"

#include <cmath>
#include <vector>

namespace heraldgauge::test {
namespace {

using model::Ask;
using model::Real;

// Doubles as an engine of the model's exact reals.
struct Binary64 {
  using Number = double;
  double constant(const model::Rational& x) const { return x.get_d(); }
  double add(double a, double b) const { return a + b; }
  double subtract(double a, double b) const { return a - b; }
  double multiply(double a, double b) const { return a * b; }
  double divide(double a, double b) const { return a / b; }
  double power_of_ten(double x) const { return std::pow(10.0, x); }
  double exponential(double x) const { return std::exp(x); }
  double hyperbolic_tangent(double x) const { return std::tanh(x); }
  double square_root(double x) const { return std::sqrt(x); }
};

double number(const Real& x) { return x.evaluate(Binary64{}); }

double factorial(int n) { return std::tgamma(n + 1.0); }
double binomial(int n, int k) { return std::round(factorial(n) / (factorial(k) * factorial(n - k))); }

// Amplitude <p, q| U |i, j> of U: a -> cosine p + sine q, b -> -sine p + cosine q (creation operators).
double mixer(int i, int j, int p, double cosine, double sine) {
  const int q = i + j - p;
  double sum = 0;
  for (int k = std::max(0, p - j); k <= std::min(i, p); ++k) {  // k of the i photons go to p
    sum += binomial(i, k) * binomial(j, p - k) * std::pow(cosine, k) * std::pow(sine, i - k) * std::pow(-sine, p - k) *
           std::pow(cosine, j - p + k);
  }
  return sum * std::sqrt(factorial(p) * factorial(q) / (factorial(i) * factorial(j)));
}

// Probability that a detector on which n photons arrive does what is asked.
double response(const model::Detector& detector, const Ask& ask, int n) {
  const double eta = number(detector.registering_probability());
  const double dark = number(detector.dark_probability);
  const double silent = (1 - dark) * std::pow(1 - eta, n);
  switch (ask.kind) {
    case Ask::Kind::not_looked_at:
      return 1;
    case Ask::Kind::silent:
      return silent;
    case Ask::Kind::clicks:
      return 1 - silent;
    case Ask::Kind::counts:
      break;
  }
  const double mean_dark = -std::log1p(-dark);
  double sum = 0;
  for (int photons = 0; photons <= std::min(n, ask.photons); ++photons) {
    const int events = ask.photons - photons;
    const double dark_events = events == 0 ? 1 : std::pow(mean_dark, events) / factorial(events);
    sum += binomial(n, photons) * std::pow(eta, photons) * std::pow(1 - eta, n - photons) * dark_events * (1 - dark);
  }
  return sum;
}

// Amplitude of keeping k of n photons with transmittance t.
double kept(int n, int k, double t) { return std::sqrt(binomial(n, k) * std::pow(t, k) * std::pow(1 - t, n - k)); }

// What one polarisation of a station sees, for one of its two detectors clicking patterns.
struct StationSide {
  double t_r, t_l, v;
  const model::Detector& c;
  const model::Detector& d;
  Ask c_ask, d_ask;
};

// <i, j| M |i2, j2> of the station operator of one polarisation, i2 + j2 = i + j: the sum over what is lost (x of R, y
// of L), what goes to the orthogonal temporal mode (z of L) and what each detector sees.
double station_element(const StationSide& side, int i, int j, int i2, int j2) {
  const double s = std::sqrt(0.5);
  double sum = 0;
  for (int x = 0; x <= std::min(i, i2); ++x) {
    const double r = kept(i, i - x, side.t_r) * kept(i2, i2 - x, side.t_r);
    for (int y = 0; y <= std::min(j, j2); ++y) {
      const double l = r * kept(j, j - y, side.t_l) * kept(j2, j2 - y, side.t_l);
      for (int z = 0; z <= std::min(j, j2) - y; ++z) {
        const double split = l * kept(j - y, j - y - z, side.v) * kept(j2 - y, j2 - y - z, side.v);
        if (split == 0) continue;
        const int matched_r = i - x, matched_l = j - y - z;
        for (int c = 0; c <= matched_r + matched_l; ++c) {
          // R goes to (c + d)/sqrt2, L to (c - d)/sqrt2.
          const double amplitudes = mixer(matched_l, matched_r, c, s, -s) * mixer(j2 - y - z, i2 - x, c, s, -s);
          for (int c_other = 0; c_other <= z; ++c_other) {
            const double other = binomial(z, c_other) * std::pow(0.5, z);
            sum += split * amplitudes * other * response(side.c, side.c_ask, c + c_other) *
                   response(side.d, side.d_ask, matched_r + matched_l - c + z - c_other);
          }
        }
      }
    }
  }
  return sum;
}

// <h, v| E |h2, v2> of an end: loss, rotation into plus and cross, detection.
double end_element(const model::End& end, double t, const std::array<Ask, 2>& asks, int h, int v, int h2, int v2) {
  if (h + v != h2 + v2) return 0;
  const double angle = end.analyser_deg.get_d() * std::acos(-1.0) / 180;
  double sum = 0;
  for (int x = 0; x <= std::min(h, h2); ++x) {
    for (int y = 0; y <= std::min(v, v2); ++y) {
      const double loss = kept(h, h - x, t) * kept(h2, h2 - x, t) * kept(v, v - y, t) * kept(v2, v2 - y, t);
      const int left = h - x + v - y;
      for (int plus = 0; plus <= left; ++plus) {
        // H = cos plus - sin cross, V = sin plus + cos cross.
        const double amplitudes = mixer(h - x, v - y, plus, std::cos(angle), -std::sin(angle)) *
                                  mixer(h2 - x, v2 - y, plus, std::cos(angle), -std::sin(angle));
        sum += loss * amplitudes * response(end.detectors[model::plus], asks[model::plus], plus) *
               response(end.detectors[model::cross], asks[model::cross], left - plus);
      }
    }
  }
  return sum;
}

struct PairState {
  int h, v;
};

std::vector<PairState> states_up_to(int pairs) {
  std::vector<PairState> states;
  for (int n = 0; n <= pairs; ++n) {
    for (int h = 0; h <= n; ++h) states.push_back({h, n - h});
  }
  return states;
}

double amplitude(const model::Source& source, const PairState& state) {
  const double parameter = number(source.pair_parameter);
  const int n = state.h + state.v;
  if (source.kind == model::SourceKind::squeezed) return (1 - parameter) * std::pow(parameter, n / 2.0);
  if (n == 0) return std::sqrt(1 - parameter);
  return n == 1 ? std::sqrt(parameter / 2) : 0;
}

double tail_of(const model::Source& source, int pairs) {
  if (source.kind == model::SourceKind::ideal_pair) return 0;
  const double lam = number(source.pair_parameter);
  return std::pow(lam, pairs + 1) * (1 + (pairs + 1) * (1 - lam));
}

using Bond = std::vector<std::vector<double>>;

// station[i][j][i2][j2] of one polarisation, up to `pairs` in every index.
using StationOperator = std::vector<std::vector<std::vector<std::vector<double>>>>;
StationOperator station_operator(const StationSide& side, int pairs) {
  const auto size = static_cast<std::size_t>(pairs + 1);
  StationOperator m(size, std::vector(size, std::vector(size, std::vector<double>(size, 0))));
  for (int i = 0; i <= pairs; ++i) {
    for (int j = 0; j <= pairs; ++j) {
      for (int i2 = std::max(0, i + j - pairs); i2 <= std::min(pairs, i + j); ++i2) {
        m[static_cast<std::size_t>(i)][static_cast<std::size_t>(j)][static_cast<std::size_t>(i2)]
         [static_cast<std::size_t>(i + j - i2)] = station_element(side, i, j, i2, i + j - i2);
      }
    }
  }
  return m;
}

class Chain {
 public:
  Chain(const model::Chain& chain, const model::Pattern& pattern, int pairs)
      : chain_(chain), pattern_(pattern), pairs_(pairs), states_(states_up_to(pairs)) {}

  double probability() const {
    Bond bond = weighted_by_source(0, end(chain_.left_end, chain_.left_arms.front(), pattern_.left));
    for (std::size_t k = 1; k <= chain_.stations.size(); ++k) bond = weighted_by_source(k, through_station(k, bond));
    const Bond right = end(chain_.right_end, chain_.right_arms.back(), pattern_.right);
    double sum = 0;
    for (std::size_t a = 0; a < states_.size(); ++a) {
      for (std::size_t b = 0; b < states_.size(); ++b) sum += bond[a][b] * right[a][b];
    }
    return sum;
  }

 private:
  Bond end(const model::End& end, const model::Arm& arm, const std::array<Ask, 2>& asks) const {
    Bond bond(states_.size(), std::vector<double>(states_.size()));
    for (std::size_t a = 0; a < states_.size(); ++a) {
      for (std::size_t b = 0; b < states_.size(); ++b) {
        bond[a][b] =
            end_element(end, number(arm.transmittance), asks, states_[a].h, states_[a].v, states_[b].h, states_[b].v);
      }
    }
    return bond;
  }

  Bond weighted_by_source(std::size_t k, Bond bond) const {
    for (std::size_t a = 0; a < states_.size(); ++a) {
      for (std::size_t b = 0; b < states_.size(); ++b) {
        bond[a][b] *= amplitude(chain_.sources[k], states_[a]) * amplitude(chain_.sources[k], states_[b]);
      }
    }
    return bond;
  }

  Bond through_station(std::size_t k, const Bond& bond) const {
    const model::Station& station = chain_.stations[k - 1];
    const double t_r = number(chain_.right_arms[k - 1].transmittance), t_l = number(chain_.left_arms[k].transmittance);
    const double v = number(station.indistinguishability);
    const auto& asks = pattern_.stations[k - 1];
    const auto& on = station.detectors;
    const auto h =
        station_operator({t_r, t_l, v, on[model::cH], on[model::dH], asks[model::cH], asks[model::dH]}, pairs_);
    const auto w =
        station_operator({t_r, t_l, v, on[model::cV], on[model::dV], asks[model::cV], asks[model::dV]}, pairs_);
    Bond next(states_.size(), std::vector<double>(states_.size(), 0));
    const auto index = [](int n) { return static_cast<std::size_t>(n); };
    for (std::size_t a = 0; a < states_.size(); ++a) {
      for (std::size_t b = 0; b < states_.size(); ++b) {
        if (bond[a][b] == 0) continue;
        for (std::size_t e = 0; e < states_.size(); ++e) {
          const PairState& x = states_[a];
          const PairState& x2 = states_[b];
          const PairState& y = states_[e];
          for (std::size_t f = 0; f < states_.size(); ++f) {
            const PairState& y2 = states_[f];
            if (x.h + y.h != x2.h + y2.h || x.v + y.v != x2.v + y2.v) continue;
            next[e][f] += bond[a][b] * h[index(x.h)][index(y.h)][index(x2.h)][index(y2.h)] *
                          w[index(x.v)][index(y.v)][index(x2.v)][index(y2.v)];
          }
        }
      }
    }
    return next;
  }

  const model::Chain& chain_;
  const model::Pattern& pattern_;
  int pairs_;
  std::vector<PairState> states_;
};

}  // namespace

FockValue fock_pattern_probability(const model::Chain& chain, const model::Pattern& pattern, int pairs) {
  FockValue result{Chain(chain, pattern, pairs).probability(), 0};
  for (const model::Source& source : chain.sources) result.tail += tail_of(source, pairs);
  return result;
}

}  // namespace heraldgauge::test
