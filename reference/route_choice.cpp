#include "reference/route_choice.hpp"

#include "reference/determinant/route.hpp"

namespace heraldgauge::reference {
namespace {

using model::Chain;
using model::Expected;
using model::Fault;
using model::Real;

constexpr double most_determinant_terms = 4e6;

Fault route_fault(const std::string& wrong, const std::string& allowed) {
  return {{"--route", 0, 0, ""}, wrong, allowed};
}

// Why the determinant route cannot be taken, its cost included.
std::optional<std::string> determinant_obstacle(const Chain& chain) {
  if (const auto refusal = determinant_refusal(chain)) return "the determinant route does not serve " + *refusal;
  if (determinant_terms(chain) <= most_determinant_terms) return std::nullopt;
  return "the determinant route would sum more than 4e6 sets of silent station detectors";
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
  const auto obstacle = determinant_obstacle(chain);
  if (request.route == RouteChoice::pair_number) return RouteName::pair_number;
  if (obstacle) return route_fault(*obstacle, "another route");
  return RouteName::determinant;
}

std::unique_ptr<Route> make_route(RouteName, const Chain& chain) { return make_determinant_route(chain); }

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
