#include "compare/fock/response.hpp"

namespace heraldgauge::compare::fock {
namespace {

using model::Ask;
using model::Detector;

// Registering and dark probabilities in one arithmetic, with (1-eta)^n and 1-(1-eta)^n, the latter without subtraction.
template <class Number>
struct Photons {
  Photons(const Arithmetic<Number>& number, const Detector& detector, long most)
      : eta(number(detector.registering_probability())),
        dark(number(detector.dark_probability)),
        quiet(number(model::Real(1) - detector.dark_probability)),
        none(powers(number, number(model::Real(1) - detector.registering_probability()), most)),
        some{number(0L)} {
    for (std::size_t n = 1; n < none.size(); ++n) some.push_back(some.back() + eta * none[n - 1]);
  }
  Number eta, dark, quiet;
  std::vector<Number> none, some;
};

template <class Number>
Number photon_click(const Arithmetic<Number>& number, const Photons<Number>& photons, ClickRule rule, std::size_t n) {
  if (rule != ClickRule::linear) return photons.some[n];
  return at_most_one(number, Number(photons.eta * number(static_cast<long>(n))));
}

// Exactly `count` of photons and dark events together.
template <class Number>
Number counted(const Arithmetic<Number>& number, const Photons<Number>& photons, long count, long n) {
  const Counting<Number> counting(number, n);
  const Number mean = number.mean_of_dark_count(photons.dark);
  Number sum = number(0L);
  for (long k = 0; k <= count && k <= n; ++k) {
    Number term = photons.quiet * photons.none[static_cast<std::size_t>(n - k)] * counting.binomial(n, k);
    for (long i = 0; i < k; ++i) term = term * photons.eta;
    for (long i = 1; i <= count - k; ++i) term = term * mean * number(Rational(1, i));
    sum = sum + term;
  }
  return sum;
}

template <class Number>
Number clicked(const Arithmetic<Number>& number, const Photons<Number>& photons, ClickRule rule, ClickPart part,
               long n) {
  const Number by_photons = photon_click(number, photons, rule, static_cast<std::size_t>(n));
  if (rule == ClickRule::overlap_dropped)
    return part == ClickPart::whole ? Number(by_photons + photons.dark) : photons.dark;
  const Number no_photon =
      rule == ClickRule::linear ? Number(number(1L) - by_photons) : photons.none[static_cast<std::size_t>(n)];
  const Number by_dark = photons.dark * no_photon;
  return part == ClickPart::whole ? Number(by_photons + by_dark) : by_dark;
}

template <class Number>
Number silent(const Arithmetic<Number>& number, const Photons<Number>& photons, ClickRule rule, long n) {
  if (rule == ClickRule::overlap_dropped) return photons.none[static_cast<std::size_t>(n)] - photons.dark;
  if (rule == ClickRule::linear) {
    return photons.quiet * (number(1L) - photon_click(number, photons, rule, static_cast<std::size_t>(n)));
  }
  return photons.quiet * photons.none[static_cast<std::size_t>(n)];
}

}  // namespace

template <class Number>
std::vector<Number> response(const Arithmetic<Number>& number, const Detector& detector, const Ask& ask, ClickRule rule,
                             ClickPart part, long most_photons) {
  const Photons<Number> photons(number, detector, most_photons);
  std::vector<Number> answer;
  for (long n = 0; n <= most_photons; ++n) {
    switch (ask.kind) {
      case Ask::Kind::not_looked_at:
        answer.push_back(number(1L));
        break;
      case Ask::Kind::silent:
        answer.push_back(silent(number, photons, rule, n));
        break;
      case Ask::Kind::counts:
        answer.push_back(counted(number, photons, ask.photons, n));
        break;
      case Ask::Kind::clicks:
        answer.push_back(rule == ClickRule::one_photon ? counted(number, photons, 1, n)
                                                       : clicked(number, photons, rule, part, n));
    }
  }
  return answer;
}

template std::vector<float> response(const Arithmetic<float>&, const Detector&, const Ask&, ClickRule, ClickPart, long);
template std::vector<double> response(const Arithmetic<double>&, const Detector&, const Ask&, ClickRule, ClickPart,
                                      long);
template std::vector<Interval> response(const Arithmetic<Interval>&, const Detector&, const Ask&, ClickRule, ClickPart,
                                        long);
template std::vector<Rational> response(const Arithmetic<Rational>&, const Detector&, const Ask&, ClickRule, ClickPart,
                                        long);

}  // namespace heraldgauge::compare::fock
