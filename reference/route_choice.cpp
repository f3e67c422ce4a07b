#include "reference/route_choice.hpp"

#include <algorithm>
#include <cmath>

#include "reference/determinant/route.hpp"
#include "reference/pair_number/route.hpp"
#include "reference/width.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Expected;
using model::Fault;
using model::Real;

constexpr double most_determinant_terms = 4e6;
constexpr double always_cheap_terms = 256;  // so few that predicting the other route's cost would cost more
constexpr Precision first_guard_bits = 64;

Fault route_fault(const std::string& wrong, const std::string& allowed) {
  return {{"--route", 0, 0, ""}, wrong, allowed};
}

// Why the determinant route cannot be taken, its cost included.
std::optional<std::string> determinant_obstacle(const Chain& chain) {
  if (const auto refusal = determinant_refusal(chain)) return "the determinant route does not serve " + *refusal;
  if (determinant_terms(chain) <= most_determinant_terms) return std::nullopt;
  return "the determinant route would sum more than 4e6 sets of silent station detectors";
}

std::optional<std::string> pair_number_obstacle(const Chain& chain, const Request& request) {
  auto refusal = pair_number_refusal(chain);
  if (!refusal && request.pattern) refusal = pair_number_refusal(chain, *request.pattern);
  if (!refusal) return std::nullopt;
  return "the pair-number route does not serve it: " + *refusal;
}

// Interval multiplications of all 16 end patterns: per term a ring closed for every pair of silent sets at the ends.
double determinant_cost(const Chain& chain) { return 200 * determinant_terms(chain); }

double approximately(const Real& x) {
  const Interval enclosed = enclose(x, 64);
  return mpfi_get_d(enclosed.raw());
}

// How rarely an end clicks, as bits of -log2 of eta t lam + d: a guess of how far a wanted joint probability lies below
// the herald, so that the first attempt at it is usually the last.
double bits_of_rarity(const model::End& end, const model::Arm& arm, const model::Source& source) {
  constexpr double most_bits = 60;
  double likeliest = 0;
  for (const model::Detector& detector : end.detectors) {
    likeliest = std::max(likeliest, approximately(detector.efficiency * arm.transmittance * source.pair_parameter) +
                                        approximately(detector.dark_probability));
  }
  return likeliest > 0 ? std::min(most_bits, -std::log2(likeliest)) : 0;
}

bool is_off_axis(const Rational& degrees) { return Rational(degrees / 90).get_den() != 1; }

// Whether some quantity asked for needs the coherences between H and V: both analysers away from multiples of 90
// degrees.
bool reads_all_sectors(const Chain& chain, const Request& request) {
  if (chain.station_count() == 0) return false;
  const bool analysers = is_off_axis(chain.left_end.analyser_deg) && is_off_axis(chain.right_end.analyser_deg);
  return std::any_of(request.quantities.begin(), request.quantities.end(), [&](const model::Quantity& quantity) {
    switch (quantity.kind) {
      case model::QuantityKind::qber_diagonal:
      case model::QuantityKind::key_fraction:
      case model::QuantityKind::key_rate:
        return true;
      case model::QuantityKind::end_pattern:
      case model::QuantityKind::pattern_probability:
        return analysers;
      case model::QuantityKind::visibility:
      case model::QuantityKind::visibility_deficit:
        return is_off_axis(chain.left_end.analyser_deg);
      default:
        return false;
    }
  });
}

std::size_t bits_of(const Real& x) {
  if (!x.is_rational()) return 0;
  return mpz_sizeinbase(x.rational().get_num_mpz_t(), 2) + mpz_sizeinbase(x.rational().get_den_mpz_t(), 2);
}

template <std::size_t Count>
std::size_t bits_of(const std::array<model::Detector, Count>& detectors) {
  std::size_t bits = 0;
  for (const model::Detector& detector : detectors)
    bits += bits_of(detector.efficiency) + bits_of(detector.dark_probability);
  return bits;
}

}  // namespace

Expected<RouteName> choose_route(const Chain& chain, const Request& request) {
  const auto determinant = determinant_obstacle(chain);
  const auto pair_number = pair_number_obstacle(chain, request);
  switch (request.route) {
    case RouteChoice::determinant:
      if (determinant) return route_fault(*determinant, "pair-number, or no --route");
      return RouteName::determinant;
    case RouteChoice::pair_number:
      if (pair_number) return route_fault(*pair_number, "determinant, or no --route");
      return RouteName::pair_number;
    case RouteChoice::cheaper:
      break;
  }
  if (determinant && pair_number)
    return route_fault(*determinant + ", and " + *pair_number, "a chain that one of them serves");
  if (determinant) return RouteName::pair_number;
  if (pair_number || request.exact || determinant_terms(chain) <= always_cheap_terms) return RouteName::determinant;
  return determinant_cost(chain) <= pair_number_cost(chain,
                                                     aimed_accuracy(chain, RouteName::pair_number, request.digits),
                                                     reads_all_sectors(chain, request))
             ? RouteName::determinant
             : RouteName::pair_number;
}

std::unique_ptr<Route> make_route(RouteName name, const Chain& chain) {
  return name == RouteName::determinant ? make_determinant_route(chain) : make_pair_number_route(chain);
}

Accuracy aimed_accuracy(const Chain& chain, RouteName route, int digits) {
  const double log2_herald = route == RouteName::pair_number ? pair_number_log2_herald(chain) : 0;
  const double ends = bits_of_rarity(chain.left_end, chain.left_arms.front(), chain.sources.front()) +
                      bits_of_rarity(chain.right_end, chain.right_arms.back(), chain.sources.back());
  const double asked_bits = bits_per_digit * (digits + 1) + ends;
  return {static_cast<Precision>(asked_bits) + first_guard_bits,
          (std::isfinite(log2_herald) ? log2_herald : 0) - asked_bits};
}

std::size_t input_bits(const Chain& chain) {
  std::size_t bits = bits_of(chain.left_end.detectors) + bits_of(chain.right_end.detectors);
  for (const model::Source& source : chain.sources) bits += bits_of(source.pair_parameter);
  for (const auto* arms : {&chain.left_arms, &chain.right_arms}) {
    for (const model::Arm& arm : *arms) bits += bits_of(arm.transmittance);
  }
  for (const model::Station& station : chain.stations) {
    bits += bits_of(station.detectors) + bits_of(station.indistinguishability);
  }
  return bits;
}

}  // namespace heraldgauge::reference
